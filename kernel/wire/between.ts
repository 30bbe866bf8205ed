import type { Header, Message } from "./message.js";

/** Who asked: enough to answer. */
export interface Asker {
  readonly identities: readonly Uint8Array[];
  readonly header: Header;
}

/** What the thread with the sockets tells the thread that runs cells. */
export type ToSession =
  | { readonly type: "request"; readonly identities: readonly Uint8Array[]; readonly message: Message }
  | { readonly type: "interrupt" }
  | { readonly type: "shutdown" };

/** What the thread that runs cells tells the thread with the sockets. */
export type ToSockets =
  | {
      readonly type: "reply";
      readonly asker: Asker;
      readonly kind: string;
      readonly content: Record<string, unknown>;
      readonly metadata?: Record<string, unknown>;
    }
  | {
      readonly type: "publish";
      readonly parent: Header | Record<string, never>;
      readonly kind: string;
      readonly content: Record<string, unknown>;
    }
  | {
      readonly type: "ask";
      readonly asker: Asker;
      readonly prompt: string;
      readonly password: boolean;
      readonly reply: SharedArrayBuffer;
    }
  | { readonly type: "running"; readonly cell: number | undefined }
  | { readonly type: "cell"; readonly parent: Header }
  | { readonly type: "failed" };
