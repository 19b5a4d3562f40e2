import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { Dealer } from "zeromq";
import { startKernelProcess } from "../../src/casework/client/kernel-process.js";
import { address, envelope, framesOf, headersOf, type Message, signatureOf } from "../../src/kernel/index.js";
import { kernelCommand, testFolder, testKernel } from "./kernel-in-test.js";

// Source: common practice, no source; the numbers are our promise.
const mutations = 1_000;
const randomCells = 200;
const newHeader = headersOf("tester");

function request(type: string, content: Record<string, unknown>): Message {
  return { identities: [], header: newHeader(type), parent: {}, metadata: {}, content, buffers: [] };
}

const requests: readonly (readonly [string, Record<string, unknown>])[] = [
  ["kernel_info_request", {}],
  ["execute_request", { code: "1 + 1", silent: false }],
  ["complete_request", { code: "Math.s", cursor_pos: 6 }],
  ["inspect_request", { code: "Math", cursor_pos: 2, detail_level: 0 }],
  ["history_request", { hist_access_type: "tail", n: 1, output: false, raw: true }],
  ["is_complete_request", { code: "1 +" }],
  ["comm_open", { comm_id: "a", target_name: "none", data: {} }],
];

describe("a kernel", () => {
  test(`answers the next valid request after ${mutations} altered messages`, {
    timeout: 180_000,
  }, async () => {
    const { connection, child, dispose } = await startKernelProcess(kernelCommand, testFolder());
    const signature = signatureOf(connection.key, connection.signature_scheme);
    const socket = new Dealer({ linger: 0, reconnectInterval: 20 });
    socket.connect(address(connection, "shell_port"));
    const change = fc.record({
      which: fc.nat(requests.length - 1),
      frame: fc.nat(6),
      at: fc.nat(300),
      to: fc.nat(255),
      cut: fc.boolean(),
    });
    for (const { which, frame, at, to, cut } of fc.sample(change, { seed: 3, numRuns: mutations })) {
      const [type, content] = requests[which] ?? ["", {}];
      const frames = framesOf(envelope(request(type, content)), signature).map((one) => Buffer.from(one));
      const target = frames[frame % frames.length];
      if (target !== undefined && target.length > 0) target[at % target.length] = to;
      await socket.send(cut ? frames.slice(0, frame) : frames);
    }
    const good = request("kernel_info_request", {});
    await socket.send(framesOf(envelope(good), signature));
    for (let answered = false; !answered; ) {
      const frames = await socket.receive();
      answered = frames.some((one) => one.toString().includes(good.header.msg_id));
    }
    expect(child.exitCode).toBeNull();
    socket.close();
    child.kill();
    await dispose();
  });

  test(`runs a valid cell after ${randomCells} cells of random text`, { timeout: 180_000 }, async () => {
    const kernel = await testKernel();
    const words = fc.constantFrom(
      "const ",
      "(",
      ")",
      "{",
      "}",
      "=>",
      "await ",
      "`",
      "'",
      ";",
      "\n",
      "a",
      "1",
      "/",
      ".",
      "class ",
    );
    const text = fc.oneof(
      fc.string({ unit: "grapheme", maxLength: 60 }),
      fc.array(words, { maxLength: 25 }).map((parts) => parts.join("")),
    );
    for (const code of fc.sample(text, { seed: 4, numRuns: randomCells })) {
      // Nothing in such a text can wait for ever, but a loop without an end can be written in it.
      const { reply } = await kernel.run(code);
      expect(["ok", "error"]).toContain(reply["status"]);
    }
    expect((await kernel.run("6 * 7")).value).toBe("42");
  });
});
