import type { RandomStream } from "../../numeric/index.js";
import {
  blockStreams,
  drawnStarts,
  type EnsembleRow,
  type EnsembleRun,
  type Ground,
  type LevelSource,
  levelSource,
  noiseDraw,
  runBounds,
  runEnsemble,
  type Starts,
  unknownsDraw,
} from "../../projection/index.js";
import type { DecisionContext } from "../setting/decision-context.js";
import { type Choice, groundAt, withValue } from "../setting/set-value.js";

/**
 * Which paths a measure is read from: the one without random change at the estimates; many that chance moves, with a
 * fit's parameters drawn; or so many draws of a fit's parameters, each with `each` paths of its own, which are `still`
 * without random change.
 */
export type PathKind =
  | "estimates"
  | "chance"
  | { readonly draws: number; readonly each: number; readonly still?: boolean };

/** Whether chance moves the paths of a kind. */
export const isMoved = (kind: PathKind): boolean =>
  kind === "chance" || (kind !== "estimates" && kind.still !== true);

/** What a run tells before its first row. */
export interface Course {
  readonly levels: LevelSource;
  readonly paths: number;
  /** Row from which other parameters hold; 0 where the same hold throughout. */
  readonly changedFrom: number;
}

/** Listens to a run: takes its rows. */
export type Follower = (course: Course) => (t: number, row: EnsembleRow) => void;

/** Runs the paths with a choice made, or as things stand. */
export type PathRunner = (follow: Follower, choice?: Choice) => void;

type RunStarts = Starts & Pick<EnsembleRun, "spread">;

/**
 * A runner of paths that meet the same random numbers, and for a fit the same drawn parameters, at every call.
 *
 * @param quantities - whether quantities are read as well.
 */
export function pathRunner(context: DecisionContext, kind: PathKind, quantities: boolean): PathRunner {
  const { rule, ground } = context;
  const paths = kind === "estimates" ? 1 : kind === "chance" ? context.paths : kind.draws * kind.each;
  const begin = beginnings(context, kind, paths);
  return (follow, choice) => {
    context.tick();
    const { starts, streams } = begin();
    const { inputs, from, periods, initial, compiled } = groundAt(context, choice);
    const held = withChoice(starts, ground, choice);
    const own = (held.ahead?.parameters ?? held.parameters).subarray(0, starts.size);
    const change = context
      .changeAt(own)
      .map((noise) => (noise === undefined || !isMoved(kind) ? undefined : noiseDraw(noise)));
    const levels = levelSource(ground, held, held.ahead?.parameters);
    runEnsemble({
      compiled,
      bounds: runBounds(rule, change),
      width: initial.length,
      inputs,
      from,
      periods,
      starts: held,
      ahead: held.ahead,
      change,
      reading: rule.states.map(() => undefined),
      spread: starts.spread,
      quantities: quantities ? rule.quantities.length : 0,
      streams,
      onRow: follow({ levels, paths, changedFrom: held.ahead?.row ?? 0 }),
    });
  };
}

interface Beginnings {
  readonly starts: RunStarts;
  readonly streams: readonly RandomStream[];
}

/** Where the paths of every run begin, and the random numbers that they then meet: always the same. */
function beginnings(context: DecisionContext, kind: PathKind, paths: number): () => Beginnings {
  const { fit, fitGround, ground } = context;
  if (fit === undefined || fitGround === undefined || kind === "estimates") {
    const starts = { ...ground, paths, size: ground.parameters.length };
    return () => ({ starts, streams: blockStreams(context.stream(), paths) });
  }
  const source = unknownsDraw(fit, fitGround.group);
  const streams = blockStreams(context.stream(), paths).map((each) => each.jump());
  const starts =
    kind === "chance"
      ? drawnStarts(fit, fitGround, source, paths, streams)
      : repeated(drawnStarts(fit, fitGround, source, kind.draws, streams), kind.each);
  // A jump leaves the stream where it is, so every run meets the same numbers.
  return () => ({ starts, streams: streams.map((each) => each.jump()) });
}

/** Starts with what is chosen put into every row, from the present on; what is chosen is no longer drawn. */
function withChoice(
  starts: RunStarts,
  { present, initial }: Ground,
  choice: Choice | undefined,
): RunStarts & Pick<EnsembleRun, "ahead"> {
  if (choice === undefined || choice.setting.role === "input") return starts;
  const { value, throughout = false } = choice;
  const { role, slot } = choice.setting;
  if (role === "initial")
    return { ...starts, initial: withValue(starts.initial, slot, initial.length, value) };
  const parameters = withValue(starts.parameters, slot, starts.size, value);
  return throughout || present === 0
    ? { ...starts, parameters }
    : { ...starts, ahead: { row: present, parameters } };
}

/** Every drawn start so many times in a row. */
function repeated(starts: RunStarts, each: number): RunStarts {
  const { paths, size, parameters, initial, spread } = starts;
  const again = (rows: Float64Array, width: number): Float64Array =>
    Float64Array.from({ length: rows.length * each }, (_, at) => {
      const row = Math.floor(at / width);
      return rows[Math.floor(row / each) * width + (at % width)]!;
    });
  return {
    paths: paths * each,
    size,
    parameters: again(parameters, size),
    initial: again(initial, initial.length / paths),
    spread: spread && again(spread, 1),
  };
}
