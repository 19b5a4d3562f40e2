import { createHmac } from "node:crypto";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { decoder, envelope, framesOf, headersOf, type Message, signatureOf } from "../../src/kernel/index.js";

// Source: Jupyter client documentation, "Messaging in Jupyter", section "The wire protocol".
const key = "a key of the test";
const signature = signatureOf(key, "hmac-sha256");
const message = (content: Record<string, unknown>): Message => ({
  identities: [Buffer.from("route")],
  header: headersOf("tester")("kernel_info_request"),
  parent: {},
  metadata: {},
  content,
  buffers: [Buffer.from([1, 2, 3])],
});
const frames = (content: Record<string, unknown> = {}): Uint8Array[] =>
  framesOf(envelope(message(content)), signature);
const text = (frame: Uint8Array | undefined): string => Buffer.from(frame ?? []).toString();

describe("the wire protocol", () => {
  test("puts ids, delimiter, signature, four dictionaries and buffers in this order", () => {
    const [route, delimiter, signed, ...rest] = frames({ code: "1" });
    expect([text(route), text(delimiter)]).toEqual(["route", "<IDS|MSG>"]);
    const mac = createHmac("sha256", key);
    for (const dictionary of rest.slice(0, 4)) mac.update(dictionary);
    expect(text(signed)).toBe(mac.digest("hex"));
    expect(rest).toHaveLength(5);
    expect(JSON.parse(text(rest[3]))).toEqual({ code: "1" });
  });

  test("reads back what it wrote", () => {
    fc.assert(
      fc.property(fc.dictionary(fc.string(), fc.jsonValue()), (content) => {
        const plain = JSON.parse(JSON.stringify(content));
        expect(decoder(signature)(frames(content))?.content).toEqual(plain);
      }),
      { seed: 1, numRuns: 200 },
    );
  });

  test("drops messages signed with another key and replayed messages", () => {
    const decode = decoder(signature);
    const good = frames();
    expect(decoder(signatureOf("another key", "hmac-sha256"))(good)).toBeUndefined();
    expect(decode(good)).toBeDefined();
    expect(decode(good)).toBeUndefined();
  });

  test("accepts unsigned messages repeatedly when the key is empty", () => {
    const unsigned = signatureOf("", "hmac-sha256");
    const decode = decoder(unsigned);
    const plain = framesOf(envelope(message({})), unsigned);
    expect(text(plain[2])).toBe("");
    expect([decode(plain), decode(plain)].every((one) => one !== undefined)).toBe(true);
  });

  test("drops every altered message, and never throws", () => {
    const changed = fc.record({ frame: fc.nat(7), at: fc.nat(400), to: fc.integer({ min: 1, max: 255 }) });
    fc.assert(
      fc.property(changed, ({ frame, at, to }) => {
        const bytes = frames({ code: "6 * 7" }).map((frame) => Buffer.from(frame));
        const target = bytes[frame] as Uint8Array;
        target[at % target.length] = (target[at % target.length] ?? 0) ^ to;
        const read = decoder(signature)(bytes);
        // Routing ids and buffers are not covered by the signature; all else is.
        const signed = frame > 0 && frame < 7;
        expect(read === undefined).toBe(signed);
      }),
      { seed: 2, numRuns: 500 },
    );
  });

  test("rejects an unsupported signature scheme", () => {
    expect(() => signatureOf("key", "hmac-nothing")).toThrowErrorMatchingInlineSnapshot(
      `[KernelError: The connection file has the signature scheme "hmac-nothing", which Node does not support. Use "hmac-sha256".]`,
    );
  });
});
