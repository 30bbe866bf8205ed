import type { Header, Message } from "./message.js";
import { makeMessage } from "./message.js";

const gatherMilliseconds = 20;

/**
 * Publishes messages in order, gathering stream text that comes in quick succession from one cell into one message:
 * a loop that prints line by line would drown the front end otherwise.
 */
export class GatheringPublisher {
  readonly #send: (message: Message, topic: string) => void;
  readonly #session: string;
  #gathered: { parent: Header | Record<string, never>; name: string; texts: string[] } | undefined;
  #timer: NodeJS.Timeout | undefined;

  constructor(send: (message: Message, topic: string) => void, session: string) {
    this.#send = send;
    this.#session = session;
  }

  publish(kind: string, content: Record<string, unknown>, parent: Header | Record<string, never>): void {
    if (kind === "stream") {
      this.#gather(String(content["name"]), String(content["text"]), parent);
      return;
    }
    this.flush();
    this.#send(makeMessage(kind, content, parent, this.#session), kind);
  }

  #gather(name: string, text: string, parent: Header | Record<string, never>): void {
    const present = this.#gathered;
    if (present && (present.name !== name || idOf(present.parent) !== idOf(parent))) this.flush();
    if (!this.#gathered) {
      this.#gathered = { parent, name, texts: [] };
      this.#timer = setTimeout(() => this.flush(), gatherMilliseconds);
    }
    this.#gathered.texts.push(text);
  }

  flush(): void {
    if (!this.#gathered) return;
    clearTimeout(this.#timer);
    const { parent, name, texts } = this.#gathered;
    this.#gathered = undefined;
    this.#send(makeMessage("stream", { name, text: texts.join("") }, parent, this.#session), "stream");
  }
}

function idOf(header: Header | Record<string, never>): string | undefined {
  return "msg_id" in header ? (header as Header).msg_id : undefined;
}
