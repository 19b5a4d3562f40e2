import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import { join } from "node:path";
import { installationFolder } from "../cells/installation.js";
import { protocolVersion } from "../protocol/message.js";

interface PackageFile {
  readonly version: string;
}

function versionIn(packageFile: string): string {
  return (JSON.parse(readFileSync(packageFile, "utf8")) as PackageFile).version;
}

/** @see Jupyter messaging, "Kernel info". */
export function kernelInfo(): Readonly<Record<string, unknown>> {
  const require = createRequire(__filename);
  const converter = require.resolve("tslab/package.json");
  const compiler = require.resolve("@tslab/typescript-for-tslab/package.json", { paths: [converter] });
  const version = versionIn(join(installationFolder(), "package.json"));
  const typescript = versionIn(compiler);
  return {
    status: "ok",
    protocol_version: protocolVersion,
    implementation: "periodwise",
    implementation_version: version,
    language_info: {
      name: "typescript",
      version: typescript,
      mimetype: "text/typescript",
      file_extension: ".ts",
      pygments_lexer: "typescript",
      codemirror_mode: { name: "javascript", typescript: true },
      nbconvert_exporter: "script",
    },
    banner: `Periodwise ${version}: TypeScript ${typescript} on Node ${process.versions.node}`,
    debugger: false,
    help_links: [
      { text: "TypeScript handbook", url: "https://www.typescriptlang.org/docs/handbook/intro.html" },
      { text: "Node.js documentation", url: "https://nodejs.org/docs/latest-v20.x/api/" },
    ],
  };
}
