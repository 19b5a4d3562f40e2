export { type RecurrenceOptions, type Rule, recurrence } from "../../src/rule/index.js";
