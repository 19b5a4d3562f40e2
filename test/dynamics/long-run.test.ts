import { expect, test } from "vitest";
import {
  attractor,
  basins,
  bifurcations,
  cobweb,
  cycles,
  equilibria,
  lyapunovExponent,
  predictionHorizon,
  trajectory,
} from "../../src/dynamics/index.js";
import { recurrence, rules } from "../../src/rule/index.js";

const quadratic = recurrence("x[t+1] = r*x*(1 - x)");
const unit = [0, 1] as const;
const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);

// Source: period-doubling values of the quadratic map, the first 3 and 1 + sqrt 6 exactly, the next two as in
// published tables, the rest by Newton's method on the period-n orbit with multiplier -1 (12 decimals; some tables
// misprint the fifth as 3.568750). Limit 3.5699456718709449 and ratio 4.669201609102990: Feigenbaum (1978).
const doublings = [
  3, 3.449489742783, 3.544090359552, 3.564407266095, 3.568759419544, 3.569691609801, 3.569891259378,
];

test("period doublings of the quadratic map are found to 1e-9", () => {
  const { places, stop } = bifurcations(quadratic, {
    vary: "r",
    range: [2.8, 3.6],
    initial: 0.3,
    limit: 7,
  });
  expect(stop).toBe("limit");
  expect(places.map(({ kind, period }) => [kind, period])).toEqual(
    [1, 2, 4, 8, 16, 32, 64].map((n) => ["flip", n]),
  );
  places.forEach(({ at }, i) => {
    expect(relative(at, doublings[i]!)).toBeLessThan(1e-9);
  });
  // Successive ratios, 8 decimals, held to 1e-4; they lead to the limit 3.56994567187 by their geometric sum.
  const gaps = places.slice(1).map(({ at }, i) => at - places[i]!.at);
  const ratios = gaps.slice(1).map((gap, i) => gaps[i]! / gap);
  [4.75144622, 4.65625102, 4.66824224, 4.66873947, 4.66913215].forEach((ratio, i) => {
    expect(Math.abs(ratios[i]! - ratio)).toBeLessThan(1e-4);
  });
  const limit = places.at(-1)!.at + gaps.at(-1)! / (4.66920160910299 - 1);
  expect(relative(limit, 3.569945671870945)).toBeLessThan(1e-8);
});

// Source: Feigenbaum (1978): distances of the two points nearest the middle shrink by 2.502907875 from one doubling to
// the next in the limit; at a cycle of 64 the second decimal has settled.
test("cycles of the quadratic map shrink by Feigenbaum's second parameter", () => {
  const { places } = bifurcations(quadratic, { vary: "r", range: [2.8, 3.6], initial: 0.3, limit: 7 });
  const gaps = places.slice(1).map(({ points, period }) => {
    const nearest = points.reduce(
      (best, x, i) => (Math.abs(x - 0.5) < Math.abs(points[best]! - 0.5) ? i : best),
      0,
    );
    return Math.abs(points[nearest]! - points[(nearest + period / 2) % period]!);
  });
  expect(gaps.at(-2)! / gaps.at(-1)!).toBeCloseTo(2.502907875095892, 2);
});

// Source: the same points for N + r N (1 - N/K), where mu = 1 + r: 2, 2.449490, 2.544090, 2.564407 (6 decimals).
test("period doublings of the crowding rule are those of the quadratic map less one", () => {
  const { places } = bifurcations(recurrence("ΔN = r*N*(1 - N/K)"), {
    vary: "r",
    parameters: { K: 1000 },
    range: [1.7, 2.57],
    initial: 300,
    limit: 4,
  });
  places.forEach(({ at }, i) => {
    expect(relative(at, doublings[i]! - 1)).toBeLessThan(1e-9);
  });
  expect(places).toHaveLength(4);
});

// Source: Newton's method on the period-n orbit with multiplier -1, 12 decimals; recalled as 2.5265, 2.6564, 2.6924.
test("period doublings of the Ricker rule are found to 1e-9", () => {
  const { places } = bifurcations(recurrence("x[t+1] = x*exp(r*(1 - x))"), {
    vary: "r",
    range: [1.8, 2.7],
    initial: 0.3,
    limit: 5,
  });
  [2, 2.526467725854, 2.656353265157, 2.684623358294, 2.690708802601].forEach((value, i) => {
    expect(relative(places[i]!.at, value)).toBeLessThan(1e-9);
  });
  // Source: the limit, about 2.69237, printed to 6 digits.
  const [before, last] = places.slice(-2).map(({ at }) => at) as [number, number];
  expect(last + (last - before) / (4.66920160910299 - 1)).toBeCloseTo(2.69237, 5);
});

// Source: the levels are 0 and K (1 - h/r), with slopes 1 + r - h and 1 - r + h: both are 1 at h = r, where they cross.
test.each([
  [1e-9, 0.1, 0.6, 0.8],
  [100, 0.1, 0.6, 0.8],
  [1e12, 0.1, 0.6, 0.8],
  [100, 0.6, 0.1, 0.8],
  [100, 0.6, 0.1, 0],
])(
  "a harvest as large as the growth washes a stock out gradually (K = %d, h from %d to %d)",
  (K, from, to, part) => {
    const washout = recurrence("ΔN = r*N*(1 - N/K) - h*N");
    const options = { parameters: { r: 0.5, K }, initial: part * K, range: [from, to] } as const;
    const { places, stop } = bifurcations(washout, { vary: "h", ...options });
    expect(places.map(({ kind, period }) => [kind, period])).toEqual([["transcritical", 1]]);
    expect(relative(places[0]!.at, 0.5)).toBeLessThan(1e-12);
    expect(Math.abs(places[0]!.points[0]!)).toBeLessThan(1e-9 * K);
    expect(stop).toBe("range");
  },
);

// Source: r N (1 - N/K) = H has its double root at N = K/2 for H = r K/4; the levels vanish together, at finite stock.
test("a fixed catch ends in a fold, at half the capacity", () => {
  const rule = recurrence("ΔN = r*N*(1 - N/K) - H");
  const options = { parameters: { r: 0.5, K: 100 }, range: [1, 20], initial: 97 } as const;
  const { places, stop } = bifurcations(rule, { vary: "H", ...options });
  expect(places.map(({ kind }) => kind)).toEqual(["fold"]);
  expect(relative(places[0]!.at, 12.5)).toBeLessThan(1e-9);
  expect(places[0]!.points[0]).toBeCloseTo(50, 4);
  expect(stop).toBe("no-cycle");
});

// Source: the levels of r x - x^3 are 0 and +-sqrt(r - 1), with slopes r and 3 - 2r; the latter is -1 at r = 2.
test("a symmetric rule loses its middle level to two others, which double their period at 2", () => {
  const { places } = bifurcations(recurrence("x[t+1] = r*x - x^3"), {
    vary: "r",
    range: [0.5, 2.1],
    initial: 0.1,
  });
  expect(places.map(({ kind }) => kind)).toEqual(["pitchfork", "flip"]);
  expect(relative(places[0]!.at, 1)).toBeLessThan(1e-9);
  expect(relative(places[1]!.at, 2)).toBeLessThan(1e-9);
});

// Source: 0 and 1 - 1/r of the quadratic map cross at r = 1; the latter doubles its period at 3, and the 2-cycle at
// 1 + sqrt 6.
test("the quadratic map is followed through its exchange of stability and on", () => {
  const { places } = bifurcations(quadratic, { vary: "r", range: [0.5, 3.46], initial: 0.3 });
  expect(places.map(({ kind }) => kind)).toEqual(["transcritical", "flip", "flip"]);
  [1, 3, 1 + Math.sqrt(6)].forEach((value, i) => {
    expect(relative(places[i]!.at, value)).toBeLessThan(1e-9);
  });
});

// Every value stays where r = 1, so nothing takes over.
test("a rule without another level to exchange stability with has no such place", () => {
  const found = bifurcations(recurrence("x[t+1] = r*x"), { vary: "r", range: [0.5, 1.5], initial: 0.3 });
  expect([found.places, found.stop]).toEqual([[], "no-cycle"]);
});

// Source: cells grow at m S/(a + S) and are washed out at D, so that they last while D < m S0/(a + S0) = 7/9.
test.each([
  [1e-9, 0.3, 0.95],
  [1, 0.3, 0.95],
  [1, 0.95, 0.3],
  [1e9, 0.3, 0.95],
])(
  "a dilution as fast as growth washes cells out of a vessel (units of %d, D from %d to %d)",
  (unit, from, to) => {
    const vessel = recurrence(
      "X[t+1] = X + h*(m*S/(a + S) - D)*X\nS[t+1] = S + h*(D*(S0 - S) - m*S/(a + S)*X/y)",
    );
    const { places, stop } = bifurcations(vessel, {
      vary: "D",
      range: [from, to],
      parameters: { h: 0.1, m: 1, a: 2 * unit, S0: 7 * unit, y: 0.5 },
      initial: from < to ? { X: 3 * unit, S: unit } : { X: 0, S: 7 * unit },
    });
    expect(places.map(({ kind }) => kind)).toEqual(["transcritical"]);
    expect(relative(places[0]!.at, 7 / 9)).toBeLessThan(1e-9);
    expect(stop).toBe("range");
  },
);

// The rule of the fixed catch with a follower that changes nothing, with a lag, and the symmetric rule with a follower.
test("systems and rules with lags tell folds, exchanges and pitchforks apart", () => {
  const catchRule = recurrence("N[t+1] = N + r*N*(1 - N/K) - H\nM[t+1] = 0.5*M + N");
  const fold = bifurcations(catchRule, {
    vary: "H",
    range: [1, 20],
    parameters: { r: 0.5, K: 100 },
    initial: { N: 97, M: 190 },
  });
  expect(fold.places.map(({ kind }) => kind)).toEqual(["fold"]);
  expect(relative(fold.places[0]!.at, 12.5)).toBeLessThan(1e-9);
  expect(fold.stop).toBe("no-cycle");
  const late = recurrence("N[t+1] = N + r*N*(1 - N[t-1]/K) - h*N");
  const options = { range: [0.1, 0.6], parameters: { r: 0.5, K: 100 }, initial: 80 } as const;
  const exchange = bifurcations(late, { vary: "h", ...options });
  expect(exchange.places.map(({ kind }) => kind)).toEqual(["transcritical"]);
  expect(relative(exchange.places[0]!.at, 0.5)).toBeLessThan(1e-9);
  const symmetric = recurrence("x[t+1] = r*x - x^3\ny[t+1] = 0.5*y + 0.1*x");
  const pitchfork = bifurcations(symmetric, { vary: "r", range: [0.5, 1.5], initial: { x: 0, y: 0 } });
  expect(pitchfork.places.map(({ kind }) => kind)).toEqual(["pitchfork"]);
  expect(relative(pitchfork.places[0]!.at, 1)).toBeLessThan(1e-9);
});

// Source: the period-3 window opens at 1 + sqrt 8 exactly.
test("the period-3 window opens where two cycles meet, at 1 + sqrt 8", () => {
  const { places } = bifurcations(quadratic, { vary: "r", range: [3.835, 3.82], initial: 0.3, limit: 1 });
  expect(places[0]!.kind).toBe("fold");
  expect(places[0]!.period).toBe(3);
  expect(relative(places[0]!.at, 1 + Math.sqrt(8))).toBeLessThan(1e-9);
});

// Source: roots of the quadratic for the 2-cycle, 16 decimals; the multiplier 4 + 2 r - r^2 = 0.16.
test("the 2-cycle of the quadratic map at 3.2", () => {
  const found = cycles(quadratic, { period: 2, parameters: { r: 3.2 }, range: unit });
  expect(found.search).toBe("every");
  expect(found.cycles).toHaveLength(1);
  const [cycle] = found.cycles;
  expect(relative(cycle!.points[0]!, 0.5130445095326299)).toBeLessThan(1e-12);
  expect(relative(cycle!.points[1]!, 0.7994554904673701)).toBeLessThan(1e-12);
  expect(cycle!.multiplier.re).toBeCloseTo(0.16, 12);
  expect(cycle!.verdict).toBe("stable");
});

// Source: general tables of the quadratic map, 7 decimals: the 4-cycle at 3.5, the 3-cycle at 3.83.
test("the 4-cycle at 3.5 and both 3-cycles at 3.83", () => {
  const four = cycles(quadratic, { period: 4, parameters: { r: 3.5 }, range: unit }).cycles;
  expect(four).toHaveLength(1);
  expect([...four[0]!.points].sort()).toEqual(
    [0.3828197, 0.5008842, 0.8269407, 0.8749973].map((x) => expect.closeTo(x, 7)),
  );
  const three = cycles(quadratic, { period: 3, parameters: { r: 3.83 }, range: unit }).cycles;
  expect(three.map(({ verdict }) => verdict).sort()).toEqual(["stable", "unstable"]);
  const stable = three.find(({ verdict }) => verdict === "stable")!;
  expect([...stable.points].sort()).toEqual(
    [0.1561493, 0.5046665, 0.9574166].map((x) => expect.closeTo(x, 7)),
  );
});

// Source: counting: x' = 4x(1 - x) has (2^p - 2)/p cycles of prime period p, all unstable with multiplier of size 2^p.
test.each([3, 5, 7])("all cycles of period %d of the chaotic quadratic map are found", (period) => {
  const found = cycles(quadratic, { period, parameters: { r: 4 }, range: unit }).cycles;
  expect(found).toHaveLength((2 ** period - 2) / period);
  for (const cycle of found) expect(cycle.multiplier.modulus / 2 ** period).toBeCloseTo(1, 6);
});

// Source: ln(1/2); 1/2 ln abs(4 + 2r - r^2); the product of slopes of the 4-cycle: 12, 12 and 4 decimals.
test.each([
  [2.5, Math.log(0.5), 1e-9],
  [3.2, -0.916290731874, 1e-9],
  [3.5, -0.8725, 1e-4],
])("the exponent of the quadratic map at %d is %d", (r, value, tolerance) => {
  const found = lyapunovExponent(quadratic, {
    parameters: { r },
    initial: { x: 0.3 },
    periods: 30_000,
    discard: 2_000,
  });
  expect(relative(found.value, value)).toBeLessThan(tolerance);
  if (tolerance === 1e-9) {
    expect(found.interval[0]).toBeLessThanOrEqual(value + 1e-12);
    expect(found.interval[1]).toBeGreaterThanOrEqual(value - 1e-12);
  }
  expect(found.verdict).toBe("not chaotic");
});

// Source: ln 2 exactly at 4; 0.496 and 0.355 at 3.9 and 3.7, to 0.002 (published figures read to 3 decimals).
test.each([
  [4, Math.LN2, 1e-3],
  [3.9, 0.496, 2e-3],
  [3.7, 0.355, 2e-3],
])("the exponent of the quadratic map at %d is %d, within the interval", (r, value, tolerance) => {
  const found = lyapunovExponent(quadratic, {
    parameters: { r },
    initial: { x: 0.3 },
    periods: 300_000,
    level: 0.99,
  });
  expect(Math.abs(found.value - value)).toBeLessThan(tolerance);
  expect(found.interval[0] - tolerance / 2).toBeLessThan(value);
  expect(found.interval[1] + tolerance / 2).toBeGreaterThan(value);
  expect(found.verdict).toBe("chaotic");
});

// Source: Python 3.11 and SciPy 1.17.1: the same 1,000 and 3,000 steps in double precision, ln |3.9 - 7.8 x| averaged over
// 30 blocks, and Student's t with 29 degrees of freedom times the blocks' standard deviation over sqrt 30.
test.each([
  [0.95, 0.48275534464243786, 0.5087250143820937],
  [0.9, 0.48495269462162405, 0.5065276644029075],
])("the interval of the exponent at level %d is that of its blocks", (level, lower, upper) => {
  const found = lyapunovExponent(quadratic, {
    parameters: { r: 3.9 },
    initial: { x: 0.3 },
    periods: 3000,
    discard: 1000,
    level,
  });
  expect(found.value).toBeCloseTo(0.4957401795122658, 9);
  expect(found.interval[0]).toBeCloseTo(lower, 9);
  expect(found.interval[1]).toBeCloseTo(upper, 9);
});

// Source: the exponent 0.419 of the quadratic map of the plane, as published to 3 digits (from memory).
test("the exponent of a system is that of its fastest growing gap", () => {
  const plane = recurrence("x[t+1] = 1 - a*x^2 + y\ny[t+1] = b*x");
  const found = lyapunovExponent(plane, {
    parameters: { a: 1.4, b: 0.3 },
    initial: { x: 0.1, y: 0.1 },
    periods: 300_000,
  });
  expect(Math.abs(found.value - 0.419)).toBeLessThan(2e-3);
});

test("an exponent under a held input is that of the rule with the input's value", () => {
  const driven = recurrence("x[t+1] = r*x*(1 - x) + u[t+1] - u[t-1]", { inputs: ["u"] });
  const options = { parameters: { r: 3.2 }, initial: { x: 0.3 }, periods: 3000 };
  const plain = lyapunovExponent(quadratic, options).value;
  expect(lyapunovExponent(driven, { ...options, inputs: { u: 7 } }).value).toBeCloseTo(plain, 10);
});

// Source: slope 1 - b(1 - lam^(-1/b)), printed to 12 decimals.
test.each([
  [1, 0.1],
  [2, -0.367544467966],
])("the multiplier of the Hassell rule with b = %d is %d", (b, slope) => {
  const { points } = equilibria(rules.hassell(), { parameters: { lam: 10, a: 0.01, b }, range: [1, 5000] });
  expect(points[0]!.multipliers[0]!.re).toBeCloseTo(slope, 11);
});

// Source: roots of the quadratic for both coordinates and of the characteristic polynomial, 13 and 8 decimals.
test("the fixed points of a quadratic map of the plane and their multipliers", () => {
  const rule = recurrence("x[t+1] = 1 - a*x^2 + y\ny[t+1] = b*x");
  const { points } = equilibria(rule, { parameters: { a: 1.4, b: 0.3 }, range: { x: [-3, 3], y: [-3, 3] } });
  expect(points).toHaveLength(2);
  const expected = [
    { x: -1.1313544770895, y: -0.3394063431269, roots: [3.2598221, -0.09202956] },
    { x: 0.6313544770895, y: 0.1894063431269, roots: [-1.92373886, 0.15594632] },
  ];
  points.forEach((point, i) => {
    expect(relative(point.at["x"]!, expected[i]!.x)).toBeLessThan(1e-12);
    expect(relative(point.at["y"]!, expected[i]!.y)).toBeLessThan(1e-12);
    expect(point.multipliers.map(({ re }) => re)).toEqual(
      expected[i]!.roots.map((root) => expect.closeTo(root, 8)),
    );
  });
});

// Source: eigenvalues of the host-parasitoid rule, 8 decimals; their product lam ln lam/(lam - 1) exceeds 1.
test("the host-parasitoid rest level turns outward", () => {
  const { points } = equilibria(rules.nicholsonBailey(), {
    parameters: { lam: 2, a: 0.1, c: 1 },
    range: { H: [1, 100], P: [1, 100] },
  });
  const [first] = points[0]!.multipliers;
  expect(first!.re).toBeCloseTo(0.84657359, 8);
  expect(Math.abs(first!.im)).toBeCloseTo(0.8182955, 8);
  expect(first!.modulus).toBeCloseTo(1.17741002, 8);
  expect(first!.modulus ** 2).toBeCloseTo((2 * Math.LN2) / 1, 12);
});

// Source: Levin and May (1976): stable if and only if r < 2 cos(pi T/(2 T + 1)); exact.
test.each([0, 1, 2, 3])("density acting %d periods late is stable up to the known limit", (lag) => {
  const limit = 2 * Math.cos((Math.PI * lag) / (2 * lag + 1));
  const verdict = (r: number) =>
    equilibria(rules.delayedDensity({ lag }), { parameters: { r, K: 100 }, range: [50, 150] }).points[0]!;
  expect(verdict(limit * 0.999).verdict).toBe("stable");
  expect(verdict(limit * 1.001).verdict).toBe("unstable");
  expect(verdict(limit).boundary).toBe(lag === 0 ? "flip" : "neimark-sacker");
});

test.each([1, 2, 3])(
  "the limit with density acting %d periods late is found as a root, and turning",
  (lag) => {
    const { places } = bifurcations(rules.delayedDensity({ lag }), {
      vary: "r",
      parameters: { K: 100 },
      range: [0.2, 1.5],
      initial: 100,
    });
    expect(places.map(({ kind }) => kind)).toEqual(["neimark-sacker"]);
    expect(relative(places[0]!.at, 2 * Math.cos((Math.PI * lag) / (2 * lag + 1)))).toBeLessThan(1e-9);
  },
);

// Source: May (1978): the clumped host-parasitoid rule is stable if and only if k < 1, exactly.
test("clumping holds a host and its parasitoid up to k = 1", () => {
  const { places } = bifurcations(rules.clumpedParasitoid(), {
    vary: "k",
    parameters: { lam: 2, a: 0.1, c: 1 },
    range: [0.5, 1.5],
    initial: { H: 30, P: 15 },
  });
  expect(places.map(({ kind }) => kind)).toEqual(["neimark-sacker"]);
  expect(relative(places[0]!.at, 1)).toBeLessThan(1e-9);
});

test("an attractor diagram shows the known cycles", () => {
  const diagram = attractor(quadratic, {
    vary: "r",
    values: { from: 3.2, to: 3.5, count: 2 },
    periods: 8,
    initial: [0.3],
  });
  expect(new Set([...diagram.values.subarray(0, 8)].map((x) => x.toFixed(9))).size).toBe(2);
  expect(new Set([...diagram.values.subarray(8)].map((x) => x.toFixed(9))).size).toBe(4);
});

test("a collapse level divides the basins, with the chance of each", () => {
  const found = basins(rules.allee(), {
    parameters: { r: 0.2, K: 100, A: 20 },
    range: [0, 110],
    known: { mean: 20, sd: 5 },
  });
  expect(found.borders).toHaveLength(1);
  expect(found.borders[0]).toBeCloseTo(20, 9);
  expect(found.basins.map(({ attractor: values }) => Math.round(values[0]!))).toEqual([0, 100]);
  expect(found.basins.map(({ probability }) => probability)).toEqual([
    expect.closeTo(0.5, 9),
    expect.closeTo(0.5, 9),
  ]);
});

// Source: ln(tolerance/error)/ln 2 with the exponent ln 2 of the chaotic quadratic map.
test("the horizon is the logarithm of the ratio over the exponent", () => {
  const found = predictionHorizon(quadratic, {
    parameters: { r: 4 },
    initial: { x: 0.3 },
    error: 1e-6,
    tolerance: 0.1,
  });
  expect(Math.abs(found.periods - Math.log(1e5) / Math.LN2)).toBeLessThan(0.1);
});

test("a cobweb goes from the line to the curve and back", () => {
  const web = cobweb(quadratic, { parameters: { r: 2.8 }, initial: { x: 0.2 }, periods: 20 });
  const run = trajectory(quadratic, { parameters: { r: 2.8 }, initial: { x: 0.2 }, periods: 20 });
  expect(web.web.y[1]).toBe(run.values["x"]![1]);
  expect(web.web.x).toHaveLength(41);
  expect(web.equilibria.map(({ verdict }) => verdict)).toContain("stable");
});

// Source: R. Lambert W form u = W(e^(1 - r)), S = K(1 - u)/r, rate 1 - u, r = 1, 10 decimals: the catch is largest
// where the slope of the rule is 1, and that place is an equilibrium under the catch.
test("largest sustainable catches of the Ricker and Beverton-Holt rules leave a fold", () => {
  const ricker = equilibria(recurrence("N[t+1] = N*exp(r*(1 - N/K)) - H"), {
    parameters: { r: 1, K: 1000, H: 330.3661247616807 },
    range: [100, 900],
  });
  expect(ricker.points.at(-1)!.at["N"]).toBeCloseTo(432.8567095902, 2);
  expect(Math.abs(ricker.points.at(-1)!.multipliers[0]!.re - 1)).toBeLessThan(1e-4);
  // K/(R - 1)(sqrt R - 1) and K/(R - 1)(sqrt R - 1)^2 for R 2, K 1000 in the form R N/(1 + (R - 1) N/K).
  const holt = equilibria(recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K) - H"), {
    parameters: { R: 2, K: 1000, H: 1000 * (Math.SQRT2 - 1) ** 2 },
    range: [100, 900],
  });
  expect(holt.points.at(-1)!.at["N"]).toBeCloseTo(414.213562373, 3);
  expect(1000 * (Math.SQRT2 - 1) ** 2).toBeCloseTo(171.572875254, 9);
});
