import assert from "node:assert/strict";
import { createHmac } from "node:crypto";
import { test } from "node:test";
import fc from "fast-check";
import { makeMessage } from "../../../kernel/wire/message.js";
import { decode, encode } from "../../../kernel/wire/signing.js";

test("what is encoded is read back, identities and buffers included", () => {
  fc.assert(
    fc.property(
      fc.jsonValue(),
      fc.array(fc.uint8Array({ minLength: 1, maxLength: 8 }), { maxLength: 3 }),
      (value, identities) => {
        const message = { ...makeMessage("status", { value }, {}, "s"), buffers: [Buffer.from("raw")] };
        const read = decode(encode({ identities, message }, "key"), "key");
        assert.ok("message" in read);
        assert.deepEqual(read.message.content, JSON.parse(JSON.stringify({ value })));
        assert.deepEqual(
          read.identities.map((part) => [...part]),
          identities.map((part) => [...part]),
        );
        assert.equal(read.message.buffers?.length, 1);
      },
    ),
    { seed: 1, numRuns: 100 },
  );
});

test("the digest is the keyed SHA-256 of the four parts in their order", () => {
  const frames = encode({ identities: [], message: makeMessage("status", { a: 1 }, {}, "s") }, "key").map(
    (frame) => Buffer.from(frame),
  );
  const digest = createHmac("sha256", "key");
  for (const part of frames.slice(2, 6)) digest.update(part);
  assert.equal(frames[1]!.toString(), digest.digest("hex"));
});

test("any flipped bit is noticed before the message is read", () => {
  const frames = encode({ identities: [], message: makeMessage("status", { a: 1 }, {}, "s") }, "key").map(
    (frame) => Buffer.from(frame),
  );
  for (let part = 1; part < 6; part++) {
    const forged = frames.map((frame) => Buffer.from(frame));
    forged[part]![0]! ^= 1;
    assert.deepEqual(decode(forged, "key"), { refused: "the signature does not match" });
  }
});

test("frames that are no message are refused with a reason", () => {
  assert.deepEqual(decode([Buffer.from("x")], "key"), {
    refused: "no delimiter between identities and message",
  });
  assert.deepEqual(decode([Buffer.from("<IDS|MSG>"), Buffer.from("")], "key"), { refused: "too few frames" });
  const parts = ["{}", "{}", "{}", "{}"].map((part) => Buffer.from(part));
  assert.deepEqual(decode([Buffer.from("<IDS|MSG>"), Buffer.from(""), ...parts], ""), {
    refused: "the header names no type or no id",
  });
  const wrong = ["{", "{}", "{}", "{}"].map((part) => Buffer.from(part));
  assert.deepEqual(decode([Buffer.from("<IDS|MSG>"), Buffer.from(""), ...wrong], ""), {
    refused: "a part is not JSON",
  });
});
