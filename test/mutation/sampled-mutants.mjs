/** Which mutants of a run are tested: Stryker has no sampling of its own, so those left out are turned away by this checker. */
import { CheckStatus } from "@stryker-mutator/api/check";
import { commonTokens, declareClassPlugin, PluginKind, tokens } from "@stryker-mutator/api/plugin";

/** The same for a mutant in every run, unlike its number. */
export function mutantKey({ fileName, location: { start, end }, mutatorName, replacement }) {
  return [fileName, start.line, start.column, end.line, end.column, mutatorName, replacement].join(":");
}

class SampledMutants {
  static inject = tokens(commonTokens.options);

  constructor(options) {
    this.sample = new Set(options.sampledMutants);
  }

  async init() {}

  async group(mutants) {
    return [mutants.map(({ id }) => id)];
  }

  async check(mutants) {
    const verdict = (mutant) =>
      this.sample.has(mutantKey(mutant))
        ? { status: CheckStatus.Passed }
        : { status: CheckStatus.CompileError, reason: "not in the sample" };
    return Object.fromEntries(mutants.map((mutant) => [mutant.id, verdict(mutant)]));
  }
}

export const strykerPlugins = [declareClassPlugin(PluginKind.Checker, "sampled-mutants", SampledMutants)];
