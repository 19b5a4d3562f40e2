import { setTimeout as pause } from "node:timers/promises";
import { afterAll, describe, expect, test } from "vitest";
import { kernelClient } from "../../src/casework/client/kernel-client.js";
import { startKernelProcess } from "../../src/casework/client/kernel-process.js";
import type { Message } from "../../src/kernel/index.js";
import { kernelCommand, testFolder } from "./kernel-in-test.js";

const started = await startKernelProcess(kernelCommand, testFolder());
const client = kernelClient(started.connection);
afterAll(async () => {
  client.send("control", "shutdown_request", { restart: false });
  await started.dispose();
  await client.close();
});

/** The next message of a type on any channel. */
function next(type: string): Promise<Message> {
  return new Promise((resolve) => {
    const stop = client.listen((_, message) => {
      if (message.header.msg_type !== type) return;
      stop();
      resolve(message);
    });
  });
}

function execute(code: string): void {
  client.send("shell", "execute_request", { code, silent: false, allow_stdin: true, stop_on_error: true });
}

// Source: Jupyter client documentation, "Messaging in Jupyter", "Messages on the stdin channel".
describe("input", () => {
  test("asks the user, and its value is the answer", async () => {
    const [question, reply] = [next("input_request"), next("execute_reply")];
    execute('const lender = await input("Lender? ", { password: true });');
    const asked = await question;
    expect(asked.content).toEqual({ prompt: "Lender? ", password: true });
    client.send("stdin", "input_reply", { status: "ok", value: "the savings bank" }, asked);
    expect((await reply).content["status"]).toBe("ok");
    const [result, done] = [next("execute_result"), next("execute_reply")];
    execute("lender");
    expect((await result).content["data"]).toEqual({ "text/plain": "'the savings bank'" });
    await done;
  });

  test("that was interrupted does not block the next one", async () => {
    const [question, reply] = [next("input_request"), next("execute_reply")];
    execute('await input("never answered")');
    await question;
    await pause(100);
    client.send("control", "interrupt_request", {});
    expect((await reply).content).toMatchObject({ status: "error", ename: "Interrupted" });
    const [again, answered] = [next("input_request"), next("execute_result")];
    execute('await input("again")');
    client.send("stdin", "input_reply", { status: "ok", value: "yes" }, await again);
    expect((await answered).content["data"]).toEqual({ "text/plain": "'yes'" });
  });
});
