import { type Table, table } from "../tables/index.js";
import { caseLog } from "./case-log.js";
import { packageVersion } from "./version.js";

/** Seed, versions, record checksums and options: what a colleague needs to come to the same digits. */
export function rerunBlock(): Table {
  const rows = [
    { what: "Seed", value: String(caseLog.seed()) },
    { what: "Periodwise", value: packageVersion() },
    { what: "Node", value: process.versions.node },
    ...caseLog.records().map((record) => ({
      what: `Record ${record.path}`,
      value: `${record.rows} rows, SHA-256 ${record.checksum}`,
    })),
    ...caseLog.steps().map((step, i) => ({ what: `Step ${i + 1}`, value: step })),
  ];
  return table({
    title: "To rerun this case",
    columns: [
      { key: "what", label: "What", kind: "text" },
      { key: "value", label: "Value", kind: "text" },
    ],
    rows,
    limit: 200,
    notes: [
      "Results are not rounded; tables round an estimate so that its standard error shows two digits.",
      "The same file and seed give the same digits on one major version of Node, and the same printed digits across versions.",
    ],
  });
}
