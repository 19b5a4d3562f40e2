import { defineConfig } from "vitest/config";
import every from "../vitest.config.js";

/**
 * The tests of the rooms that are mutated. They are chosen here: given to Stryker as its test files, they would make
 * it switch on a change in a table of constants only after that table is filled.
 */
const chosen: string[] = process.env["PERIODWISE_MUTATION_TESTS"]?.split(",") ?? [];

export default defineConfig({ ...every, test: { ...every.test, include: chosen } });
