// The schema of every public function beside the type that its cells are checked with.
import { describe, expect, test } from "vitest";
import { functions } from "../../kernel-helpers/options/functions.js";
import { describedFields, optionsType, publicFunctions } from "./described-fields.js";
import { writeSentences } from "./write-sentences.js";

const found = publicFunctions();
const { checker, signatures } = found;

test("every public function has a schema, and no other has one", () => {
  expect([...functions.keys()].sort()).toEqual([...signatures.keys()].sort());
});

describe("options of the type and of the schema are the same", () => {
  const withOptions = [...functions.values()].filter(({ options }) => options !== undefined);
  test.each(withOptions.map((schema) => [schema.name, schema] as const))("%s", (name, { options }) => {
    const type = optionsType(checker, signatures.get(name)!)!;
    const members = (type.isUnion() ? type.types : [type]).filter((member) => !member.isStringLiteral());
    const names = new Set(
      members.flatMap((member) => member.getProperties().map((property) => property.name)),
    );
    const ofFits = Object.entries(options!.fields).filter(([, { of }]) => of === "fit");
    for (const [each] of ofFits) names.add(each);
    expect([...names].sort()).toEqual(Object.keys(options!.fields).sort());
  });
});

describe("a message calls an argument as the docstring does", () => {
  test.each([...functions.values()].map((schema) => [schema.name, schema] as const))(
    "%s",
    (name, { takes }) => {
      const parameters = signatures
        .get(name)!
        .flatMap((signature) => signature.parameters.map((each) => each.name));
      for (const argument of takes) expect(parameters).toContain(argument.name);
    },
  );
});

test("the sentence of every field is the comment above it", () => {
  const unlike = describedFields(found).filter(({ comment, field }) => comment !== field.says);
  if (process.env["PERIODWISE_SENTENCES"] === "write") return writeSentences(unlike);
  expect(unlike.map(({ name, comment, field }) => `${name}: "${comment}" is not "${field.says}"`)).toEqual(
    [],
  );
});
