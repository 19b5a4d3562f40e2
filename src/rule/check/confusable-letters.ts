/** Letters of other alphabets that look like Latin ones in most typefaces, and those they look like. */
const confusables: ReadonlyMap<string, string> = new Map(
  Object.entries({
    Cyrillic: ["АВЕКМНОРСТХаеорсухі", "ABEKMHOPCTXaeopcyxi"],
    Greek: ["ΑΒΕΖΗΙΚΜΝΟΡΤΥΧονκ", "ABEZHIKMNOPTYXovk"],
  }).flatMap(([, [from = "", to = ""]]) => [...from].map((letter, i) => [letter, to[i]!] as const)),
);

/** The name with every such letter replaced: two names of one appearance become the same. */
export const skeleton = (name: string): string =>
  [...name].map((letter) => confusables.get(letter) ?? letter).join("");
