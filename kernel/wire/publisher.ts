import type { Header, Message } from "./message.js";
import { makeMessage } from "./message.js";

const gatherMilliseconds = 20;

/**
 * Publishes messages in order, gathering stream text that comes in quick succession from one cell into one message:
 * a loop that prints line by line would drown the front end otherwise.
 */
export class GatheringPublisher {
  readonly #send: (message: Message, topic: string) => Promise<void>;
  readonly #session: string;
  readonly #sent: (length: number) => void;
  #gathered: { parent: Header | Record<string, never>; name: string; texts: string[] } | undefined;
  #timer: NodeJS.Timeout | undefined;

  /** @param sent is told of stream text that has been sent: its length */
  constructor(
    send: (message: Message, topic: string) => Promise<void>,
    session: string,
    sent: (length: number) => void,
  ) {
    this.#send = send;
    this.#session = session;
    this.#sent = sent;
  }

  publish(kind: string, content: Record<string, unknown>, parent: Header | Record<string, never>): void {
    if (kind === "stream") {
      this.#gather(String(content["name"]), String(content["text"]), parent);
      return;
    }
    this.flush();
    void this.#send(makeMessage(kind, content, parent, this.#session), kind);
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
    const text = texts.join("");
    const message = makeMessage("stream", { name, text }, parent, this.#session);
    void this.#send(message, "stream").then(() => this.#sent(text.length));
  }
}

function idOf(header: Header | Record<string, never>): string | undefined {
  return "msg_id" in header ? (header as Header).msg_id : undefined;
}
