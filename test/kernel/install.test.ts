import { existsSync, mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { homedir } from "node:os";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { dataFolder, installSpecification, removeSpecification } from "../../src/casework/index.js";
import { kernelCommand, root, testFolder } from "./kernel-in-test.js";

// Source: Jupyter documentation, "Common directories and file locations" (data files) and "Making kernels for
// Jupyter" (kernel specs).
describe("the data folder", () => {
  test.each([
    [undefined, { JUPYTER_DATA_DIR: "/d" }, "linux", "/d"],
    [undefined, { XDG_DATA_HOME: "/x" }, "linux", "/x/jupyter"],
    [undefined, {}, "linux", join(homedir(), ".local/share/jupyter")],
    [undefined, {}, "darwin", join(homedir(), "Library/Jupyter")],
    [undefined, { APPDATA: "/a" }, "win32", "/a/jupyter"],
    ["/opt/one", { JUPYTER_DATA_DIR: "/d" }, "linux", "/opt/one/share/jupyter"],
  ])("with prefix %s and %j on %s is %s", (prefix, env, platform, folder) => {
    expect(dataFolder(prefix, env, platform)).toBe(folder);
  });
});

describe("install", () => {
  test("writes a specification with absolute paths, version and marker", () => {
    const data = testFolder();
    const folder = installSpecification(data, kernelCommand);
    expect(folder).toBe(join(data, "kernels", "periodwise"));
    const written = JSON.parse(readFileSync(join(folder, "kernel.json"), "utf8"));
    const { version } = JSON.parse(readFileSync(join(root, "package.json"), "utf8"));
    expect(written.argv).toEqual([...kernelCommand, "{connection_file}"]);
    expect(written).toMatchObject({ language: "typescript", interrupt_mode: "message" });
    expect(written.metadata.periodwise.version).toBe(version);
    expect(readFileSync(join(folder, "logo-64x64.png")).subarray(1, 4).toString()).toBe("PNG");
  });

  test("can be repeated, and remove deletes everything", () => {
    const data = testFolder();
    installSpecification(data, kernelCommand);
    const folder = installSpecification(data, kernelCommand);
    expect(removeSpecification(data)).toBe(folder);
    expect(existsSync(folder)).toBe(false);
    expect(removeSpecification(data)).toBeUndefined();
  });

  test("leaves a folder of that name from another program", () => {
    const data = testFolder();
    const folder = join(data, "kernels", "periodwise");
    mkdirSync(folder, { recursive: true });
    writeFileSync(join(folder, "kernel.json"), '{ "argv": ["other"], "metadata": {} }');
    const message = `The folder "${folder}" was not created by "periodwise install" and is left unchanged. Remove it yourself if it is no longer needed.`;
    expect(() => installSpecification(data, kernelCommand)).toThrow(message);
    expect(() => removeSpecification(data)).toThrow(message);
    expect(existsSync(folder)).toBe(true);
  });
});
