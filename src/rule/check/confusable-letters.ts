/** Cyrillic and Greek letters that look like Latin ones in most typefaces (a subset of Unicode UTS #39, confusables). */
const confusables: ReadonlyMap<string, string> = new Map(
  Object.entries({
    Cyrillic: ["АВЕКМНОРСТХаеорсухі", "ABEKMHOPCTXaeopcyxi"],
    Greek: ["ΑΒΕΖΗΙΚΜΝΟΡΤΥΧονκ", "ABEZHIKMNOPTYXovk"],
  }).flatMap(([, [from = "", to = ""]]) => [...from].map((letter, i) => [letter, to[i]!] as const)),
);

/** The name with every confusable letter replaced: names that look the same get the same skeleton. */
export const skeleton = (name: string): string =>
  [...name].map((letter) => confusables.get(letter) ?? letter).join("");
