import { ModelError } from "../numeric/index.js";

export function refuseStateUnknown(state: string, states: readonly string[]): ModelError {
  return new ModelError(
    "unknown-state",
    `The forecast has no state "${state}". It has: ${states.join(", ")}.`,
    { state, states },
  );
}

export function refuseTarget(value: number): ModelError {
  return new ModelError(
    "target-not-finite",
    `The value to reach must be a finite number; ${value} was given.`,
    { value },
  );
}

export function refuseLevel(level: number): ModelError {
  return new ModelError(
    "level-outside",
    `An interval has a level between 0 and 1, such as 0.95; ${level} was given.`,
    {
      level,
    },
  );
}

export function refuseNotWatched(state: string, value: number, direction: string): ModelError {
  return new ModelError(
    "paths-not-kept",
    `The paths were too many to keep, and ${state} at ${value} was not watched. Run it again with watch: [{ state: "${state}", value: ${value}, direction: "${direction}" }].`,
    { state, value, direction },
  );
}
