/** One figure of every kind, on invented numbers of the hatchery and the store, for tests of what is shown. */
import {
  changeFigure,
  cobwebFigure,
  type Figure,
  fanFigure,
  figure,
  fittedFigure,
  profileFigure,
  recordFigure,
  sensitivityFigure,
  smallMultiples,
} from "../../kernel-helpers/figures/index.js";

const hour = { title: "Time", unit: "h" };
const density = { title: "Density", unit: "10^4 cells/mL" };
const x = [0, 12, 24, 36, 48, 60, 84, 96, 108, 120];
const path = (t: number): number => 150 / (1 + 29 * Math.exp(-0.032 * t));
const y = x.map((t, i) => path(t) * (1 + 0.05 * Math.sin(7 * i)));
const ahead = Array.from({ length: 31 }, (_, i) => 120 + 4 * i);
const fine = Array.from({ length: 81 }, (_, i) => 2 * i);
const next = (n: number): number => (1.47 * n) / (1 + (0.47 * n) / 150);

const recorded = { name: "flask A", x, y };
const flask = (i: number): { name: string; recorded: typeof recorded; fitted: typeof recorded } => ({
  name: `flask ${i + 1}`,
  recorded: { ...recorded, y: y.map((value) => value * (1 + 0.03 * (i % 5))) },
  fitted: { name: "fitted", x, y: x.map(path) },
});

/** By kind. Every one has axis titles with the units `h` or `10⁴ cells/mL`. */
export const figuresOfEveryKind: Readonly<Record<string, Figure>> = {
  record: recordFigure({
    title: "The record as it came",
    x: hour,
    y: density,
    series: [recorded, { name: "flask B", x, y: y.map((value) => 0.9 * value) }],
    flagged: [{ x: 84, y: y[6] as number, why: "two steps after the last reading" }],
  }),
  change: changeFigure({
    title: "Change against density",
    value: density,
    change: { title: "Change", unit: "10^4 cells/mL per half day" },
    pairs: [
      {
        name: "one step apart",
        value: y.slice(0, 6),
        change: y.slice(1, 7).map((to, i) => to - (y[i] as number)),
      },
      {
        name: "two steps apart, per step",
        value: [y[5] as number],
        change: [((y[6] as number) - (y[5] as number)) / 2],
        multiStep: true,
      },
    ],
    rules: [{ name: "sheltered", x: fine, y: fine.map((n) => next(n) - n) }],
    equilibria: [
      { value: 0, stable: false },
      { value: 150, stable: true },
    ],
  }),
  fitted: fittedFigure({
    title: "Observed and fitted",
    x: hour,
    y: density,
    series: [
      {
        name: "",
        observed: { ...recorded, name: "mean of two counts" },
        replicates: {
          name: "single counts",
          x: [...x, ...x],
          y: [...y.map((v) => 0.96 * v), ...y.map((v) => 1.05 * v)],
        },
        fitted: [
          { name: "sheltered", x, y: x.map(path) },
          { name: "crowding", x, y: x.map((t) => 0.95 * path(t)) },
        ],
      },
    ],
  }),
  residuals: figure({
    title: "Residuals",
    panels: ["By time", "By fitted value"].map((title) => ({
      title,
      x: title === "By time" ? hour : density,
      y: { title: "Residual", unit: "10^4 cells/mL" },
      layers: [
        { mark: "threshold", name: "zero", y: 0, inLegend: false },
        { mark: "points", name: "residual", x, y: y.map((value, i) => value - path(x[i] as number)) },
      ],
    })),
  }),
  cobweb: cobwebFigure({
    title: "Cobweb of the sheltered rule",
    state: density,
    rule: { name: "rule", present: fine, next: fine.map(next) },
    trajectory: [5, 12, 25, 48, 80, 110],
    equilibria: [{ value: 150, stable: true }],
  }),
  profile: profileFigure({
    title: "Profiles of the parameters",
    measure: "Rise of the sum of squares / sigma²",
    cut: 4.8,
    level: "95%",
    profiles: [
      {
        parameter: "r",
        unit: "per h",
        values: fine.map((i) => i / 1000),
        increase: fine.map((i) => (i - 60) ** 2 / 400),
        estimate: 0.06,
        lower: 0.016,
        upper: 0.104,
      },
      {
        parameter: "K",
        unit: "10^4 cells/mL",
        values: fine,
        increase: fine.map((i) => (i < 80 ? (i - 80) ** 2 / 300 : 3)),
        estimate: 80,
        lower: 42,
        upper: undefined,
      },
    ],
  }),
  fan: fanFigure({
    title: "Density ahead",
    x: hour,
    y: density,
    series: [
      {
        name: "",
        recorded,
        central: { name: "fitted path", x: ahead, y: ahead.map(path) },
        bands: [0.5, 0.8, 0.95].map((level) => ({
          level,
          of: "future observation",
          x: ahead,
          lower: ahead.map((t) => path(t) * (1 - 0.12 * level)),
          upper: ahead.map((t) => path(t) * (1 + 0.12 * level)),
        })),
        recordEnd: 120,
        predictionHorizon: 220,
      },
    ],
    threshold: { value: 120, name: "draw-down at 120" },
    event: "Reaches 120 by hour 168 with probability 0.94 (Monte-Carlo error 0.004).",
  }),
  sensitivity: sensitivityFigure({
    title: "What moves the draw-down hour",
    answer: { title: "Change of the hour", unit: "h" },
    by: "one standard error",
    changes: [
      { parameter: "R", lowered: 3.2, raised: -2.9 },
      { parameter: "K", lowered: 8.1, raised: -4.4 },
    ],
  }),
  "few multiples": smallMultiples({
    title: "Four flasks",
    x: hour,
    y: density,
    series: [0, 1, 2, 3].map(flask),
  }),
  "many multiples": smallMultiples({
    title: "Forty flasks",
    x: hour,
    y: density,
    series: Array.from({ length: 40 }, (_, i) => flask(i)),
  }),
};
