const letters: ReadonlyMap<string, string> = new Map(
  Object.entries({
    α: "alpha",
    β: "beta",
    γ: "gamma",
    δ: "delta",
    ε: "epsilon",
    ζ: "zeta",
    η: "eta",
    θ: "theta",
    κ: "kappa",
    λ: "lambda",
    μ: "mu",
    ν: "nu",
    ξ: "xi",
    π: "pi",
    ρ: "rho",
    σ: "sigma",
    τ: "tau",
    φ: "phi",
    χ: "chi",
    ψ: "psi",
    ω: "omega",
    // Names that a rule may use where the letter itself is hard to type.
    lam: "lambda",
  }),
);

const spelledOut: ReadonlySet<string> = new Set(letters.values());

/** A name split into base and subscripts: beta0 is beta with 0, N_max is N with max. */
function split(name: string): { readonly base: string; readonly subscripts: readonly string[] } {
  const [first = name, ...rest] = name.split("_").filter((part) => part !== "");
  const [, base = first, digits = ""] = /^(\P{N}+)(\p{N}+)$/u.exec(first) ?? [];
  return { base, subscripts: [...(digits === "" ? [] : [digits]), ...rest] };
}

const upright = (word: string): string => `\\mathrm{${word.replace(/[^\p{L}\p{N}]/gu, "")}}`;

function symbol(word: string): string {
  const letter = letters.get(word) ?? word;
  if (spelledOut.has(letter)) return `\\${letter}`;
  return [...word].length === 1 ? word : upright(word);
}

const part = (word: string): string =>
  /^\p{N}+$/u.test(word) || [...word].length === 1 ? word : upright(word);

/** A name as TeX, with its period where it has one: N1 at t+1 is N_{1,t+1}. */
export function texName(name: string, period: string): string {
  const { base, subscripts } = split(name);
  const subscript = [...subscripts.map(part), ...(period === "" ? [] : [period])].join(",");
  return subscript === "" ? symbol(base) : `${symbol(base)}_{${subscript}}`;
}
