import { randomUUID } from "node:crypto";

/** Version of the Jupyter messaging protocol that is spoken. */
export const protocolVersion = "5.4";

/** Header of a message. */
export interface Header {
  readonly msg_id: string;
  readonly session: string;
  readonly username: string;
  readonly date: string;
  readonly msg_type: string;
  readonly version: string;
}

/** A message of the Jupyter messaging protocol. */
export interface Message {
  readonly header: Header;
  readonly parent_header: Header | Record<string, never>;
  readonly metadata: Record<string, unknown>;
  readonly content: Record<string, unknown>;
  readonly buffers?: readonly Uint8Array[];
}

/** A new message, in answer to or on behalf of `parent`. */
export function makeMessage(
  type: string,
  content: Record<string, unknown>,
  parent: Header | Record<string, never>,
  session: string,
  metadata: Record<string, unknown> = {},
): Message {
  const header: Header = {
    msg_id: randomUUID(),
    session,
    username: "lagbook",
    date: new Date().toISOString(),
    msg_type: type,
    version: protocolVersion,
  };
  return { header, parent_header: parent, metadata, content };
}
