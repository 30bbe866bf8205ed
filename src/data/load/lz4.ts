import { InputError } from "../../numeric/index.js";

/**
 * Decodes one LZ4 frame (LZ4 Frame Format 1.6.2 and LZ4 Block Format, both public). Checksums are passed over: what
 * the bytes hold is checked by the reader of the format around them. Throws InputError for bytes that are no frame.
 */
export function decodeLz4Frame(source: Uint8Array): Uint8Array {
  const view = new DataView(source.buffer, source.byteOffset, source.byteLength);
  if (source.length < 7 || view.getUint32(0, true) !== 0x184d2204) throw new InputError("no LZ4 frame");
  const flags = source[4]!;
  const hasSize = (flags & 0x08) !== 0;
  let at = 6 + (hasSize ? 8 : 0) + ((flags & 0x01) !== 0 ? 4 : 0) + 1;
  let target = new Uint8Array(hasSize ? Number(view.getBigUint64(6, true)) : 4 * source.length);
  let length = 0;
  for (;;) {
    const size = view.getUint32(at, true);
    at += 4;
    if (size === 0) return target.subarray(0, length);
    const bytes = size & 0x7fffffff;
    const block = source.subarray(at, at + bytes);
    if (size >>> 31) {
      target = withRoom(target, length, block.length);
      target.set(block, length);
      length += block.length;
    } else ({ target, length } = decodeBlock(block, target, length));
    at += bytes + ((flags & 0x10) !== 0 ? 4 : 0);
  }
}

function withRoom(target: Uint8Array<ArrayBuffer>, length: number, more: number): Uint8Array<ArrayBuffer> {
  if (length + more <= target.length) return target;
  const larger = new Uint8Array(Math.max(2 * target.length, length + more));
  larger.set(target.subarray(0, length));
  return larger;
}

/** Appends what a block stands for; its matches may reach back into the blocks before it. */
function decodeBlock(
  block: Uint8Array,
  target: Uint8Array<ArrayBuffer>,
  length: number,
): { target: Uint8Array<ArrayBuffer>; length: number } {
  let at = 0;
  const lengthFrom = (nibble: number): number => {
    let value = nibble;
    if (nibble === 15) {
      let byte = 255;
      while (byte === 255) {
        byte = block[at++]!;
        value += byte;
      }
    }
    return value;
  };
  while (at < block.length) {
    const token = block[at++]!;
    const literals = lengthFrom(token >> 4);
    target = withRoom(target, length, literals);
    target.set(block.subarray(at, at + literals), length);
    at += literals;
    length += literals;
    if (at >= block.length) break; // the last sequence has no match
    const offset = block[at]! | (block[at + 1]! << 8);
    at += 2;
    const matched = 4 + lengthFrom(token & 15);
    if (offset === 0 || offset > length) throw new InputError("a damaged LZ4 block");
    target = withRoom(target, length, matched);
    // Byte by byte, since a match may run into what it writes.
    for (let i = 0; i < matched; i++, length++) target[length] = target[length - offset]!;
  }
  return { target, length };
}
