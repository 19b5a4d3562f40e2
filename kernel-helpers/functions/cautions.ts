/** Printed in every write-up; an analyst may add to it, not take away. */
export const standardCaution: string =
  "This is a calculation from the record and assumptions stated above. It is not legal, financial, medical, safety " +
  "or resource-management advice. Rules differ between places and change over time; local law, codes and contracts " +
  "prevail, and decisions should be confirmed with a person licensed or competent in the matter. Projections hold " +
  "only while the stated rule and conditions hold; the bands do not cover changes in the rule, errors in the record, " +
  "or events not represented in it.";

/** What each field of work adds. */
export const domainCautions: Readonly<Record<Domain, string>> = {
  debts: "Obtain the settlement figure from the lender in writing before paying.",
  cultures:
    "Follow the laboratory's biosafety and quality procedures; do not use for release, treatment or dosing.",
  stock: "For essential goods apply the required service standard and contingency stock.",
  harvest: "Apply the precautionary limits of the competent authority.",
};

/** Fields of work a case can belong to. */
export type Domain = "debts" | "cultures" | "stock" | "harvest";

/** The caution of a case: the standard text and its field's addition. */
export function cautionOf(domain: Domain): string {
  return `${standardCaution} ${domainCautions[domain]}`;
}
