/**
 * Who may import whom. The flow of a case is the order of the rooms; imports go one way, against it.
 */
const inward = [
  ["numeric", []],
  ["record", ["numeric"]],
  ["rule", ["numeric"]],
  ["dynamics", ["numeric", "record", "rule"]],
  ["estimate", ["numeric", "record", "rule", "dynamics"]],
  ["projection", ["numeric", "record", "rule", "dynamics", "estimate"]],
  ["evidence", ["numeric", "record", "rule", "dynamics", "estimate", "projection"]],
  ["decision", ["numeric", "record", "rule", "dynamics", "estimate", "projection", "evidence"]],
  ["store", ["numeric", "record"]],
  ["kernel", []],
  ["casework", ["kernel"]],
];

// Counts, lists and escaped text are written by the same functions wherever a person reads them.
const mayUseWording = new Set(["store", "casework"]);
const wordingDoor = "^kernel-helpers/wording/index\\.ts$";

const pure = "numeric|record|rule|dynamics|estimate|projection|evidence|decision";

module.exports = {
  forbidden: [
    // A type may look back at the concept it describes; what runs may not.
    {
      name: "no-cycles",
      severity: "error",
      from: {},
      to: { circular: true, viaOnly: { dependencyTypesNot: ["type-only"] } },
    },
    ...inward.map(([room, rooms]) => ({
      name: `${room}-imports-only-what-comes-before`,
      severity: "error",
      from: { path: `^src/${room}/` },
      to: {
        path: "^(src|kernel-helpers)/",
        pathNot: [`^src/(${[room, ...rooms].join("|")})/`, ...(mayUseWording.has(room) ? [wordingDoor] : [])],
      },
    })),
    {
      name: "wording-imports-nothing-else",
      severity: "error",
      from: { path: "^kernel-helpers/wording/" },
      to: { path: "^(src|kernel-helpers)/", pathNot: "^kernel-helpers/wording/" },
    },
    {
      name: "wording-is-entered-through-its-index",
      severity: "error",
      from: { pathNot: "^kernel-helpers/wording/" },
      to: { path: "^kernel-helpers/wording/", pathNot: wordingDoor },
    },
    {
      name: "a-room-is-entered-through-its-index",
      severity: "error",
      from: { path: "^src/([^/]+)/" },
      to: { path: "^src/([^/]+)/", pathNot: ["^src/$1/", "^src/[^/]+/index\\.ts$"] },
    },
    {
      name: "helpers-enter-rooms-through-their-index",
      severity: "error",
      from: { path: "^kernel-helpers/" },
      to: { path: "^src/", pathNot: "^src/[^/]+/index\\.ts$" },
    },
    {
      name: "helpers-do-not-drive-the-kernel",
      severity: "error",
      from: { path: "^kernel-helpers/" },
      to: { path: "^src/(casework|cli)/" },
    },
    {
      name: "pure-rooms-touch-no-node-built-in",
      severity: "error",
      from: { path: `^src/(${pure})/` },
      to: { dependencyTypes: ["core"] },
    },
  ],
  options: {
    doNotFollow: { path: "node_modules" },
    exclude: { path: "(^|/)(node_modules|dist|stand-ins)/" },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: "tsconfig.json" },
    enhancedResolveOptions: { extensions: [".ts", ".js", ".mjs"], exportsFields: ["exports"] },
  },
};
