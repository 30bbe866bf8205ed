import { createHmac, timingSafeEqual } from "node:crypto";
import type { Message } from "./message.js";

/** What stands between routing identities and message on the wire. */
export const delimiter = Buffer.from("<IDS|MSG>");

/** The keyed digest of the four parts of a message; empty when no key was agreed. */
export function sign(key: string, parts: readonly Uint8Array[]): string {
  if (key === "") return "";
  const digest = createHmac("sha256", key);
  for (const part of parts) digest.update(part);
  return digest.digest("hex");
}

/** A message with the identities that route its answer. */
export interface Envelope {
  readonly identities: readonly Uint8Array[];
  readonly message: Message;
}

/** Frames that arrived and cannot be trusted or read. */
export interface Refused {
  readonly refused: string;
}

/** Reads the frames of one message. The digest is checked before anything is parsed. */
export function decode(frames: readonly Uint8Array[], key: string): Envelope | Refused {
  const at = frames.findIndex((frame) => delimiter.equals(frame));
  if (at < 0) return { refused: "no delimiter between identities and message" };
  const signature = frames[at + 1];
  const parts = frames.slice(at + 2, at + 6);
  if (!signature || parts.length < 4) return { refused: "too few frames" };
  const wanted = Buffer.from(sign(key, parts));
  const given = Buffer.from(signature);
  if (key !== "" && (wanted.length !== given.length || !timingSafeEqual(wanted, given))) {
    return { refused: "the signature does not match" };
  }
  try {
    const [header, parent_header, metadata, content] = parts.map((part) =>
      JSON.parse(Buffer.from(part).toString("utf8")),
    );
    if (typeof header?.msg_type !== "string" || typeof header?.msg_id !== "string") {
      return { refused: "the header names no type or no id" };
    }
    const message: Message = {
      header,
      parent_header,
      metadata,
      content: content ?? {},
      buffers: frames.slice(at + 6),
    };
    return { identities: frames.slice(0, at), message };
  } catch {
    return { refused: "a part is not JSON" };
  }
}

/** The frames of one message, signed. */
export function encode({ identities, message }: Envelope, key: string): Uint8Array[] {
  const parts = [message.header, message.parent_header, message.metadata, message.content].map((part) =>
    Buffer.from(JSON.stringify(part), "utf8"),
  );
  return [...identities, delimiter, Buffer.from(sign(key, parts)), ...parts, ...(message.buffers ?? [])];
}
