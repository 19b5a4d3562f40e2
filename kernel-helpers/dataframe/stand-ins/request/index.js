/** Refuses the network reads that danfojs-node offers: a record is a file that can be named and checksummed. */

function refuse(asked) {
  const address = typeof asked === "string" ? asked : asked.url;
  throw new Error(
    `"${address}" was not read: records are not fetched from the network. Save the file and read it by its path.`,
  );
}
refuse.get = refuse;

Object.defineProperty(exports, "__esModule", { value: true });
exports.default = refuse;
