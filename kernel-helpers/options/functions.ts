import { rules } from "../../src/rule/index.js";
import { caseSchemas } from "./case-schemas.js";
import { decisionSchemas } from "./decision-schemas.js";
import { dynamicsSchemas } from "./dynamics-schemas.js";
import { evidenceSchemas } from "./evidence-schemas.js";
import { fitSchemas } from "./fit-schemas.js";
import { frameSchemas } from "./frame-schemas.js";
import type { FunctionSchema } from "./function-schema.js";
import { projectionSchemas } from "./projection-schemas.js";
import { recordSchemas } from "./record-schemas.js";
import { catalogueSchema, ruleSchemas } from "./rule-schemas.js";
import { tableSchemas } from "./table-schemas.js";

/** Every public function, those of the catalogue as `rules.logistic`, by name. */
export const functions: ReadonlyMap<string, FunctionSchema> = new Map(
  [
    ...caseSchemas,
    ...recordSchemas,
    ...frameSchemas,
    ...ruleSchemas,
    ...Object.keys(rules).map(catalogueSchema),
    ...dynamicsSchemas,
    ...fitSchemas,
    ...evidenceSchemas,
    ...projectionSchemas,
    ...decisionSchemas,
    ...tableSchemas,
  ].map((schema) => [schema.name, schema]),
);
