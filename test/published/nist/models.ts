/** A model of the collection: its value at parameters b for the predictors x. */
export type Model = (b: ArrayLike<number>, x: readonly number[]) => number;

/** Models of the fixture's problems, as its source states them; the response of Nelson is log(y). */
export const models: Readonly<Record<string, Model>> = {
  Misra1a: (b, [x]) => b[0]! * (1 - Math.exp(-b[1]! * x!)),
  Misra1b: (b, [x]) => b[0]! * (1 - (1 + (b[1]! * x!) / 2) ** -2),
  Misra1d: (b, [x]) => (b[0]! * b[1]! * x!) / (1 + b[1]! * x!),
  DanWood: (b, [x]) => b[0]! * x! ** b[1]!,
  Chwirut2: (b, [x]) => Math.exp(-b[0]! * x!) / (b[1]! + b[2]! * x!),
  Lanczos1: exponentials,
  Lanczos3: exponentials,
  Gauss1: peaks,
  Gauss2: peaks,
  Kirby2: (b, [x]) => (b[0]! + b[1]! * x! + b[2]! * x! ** 2) / (1 + b[3]! * x! + b[4]! * x! ** 2),
  Thurber: (b, [x]) =>
    (b[0]! + b[1]! * x! + b[2]! * x! ** 2 + b[3]! * x! ** 3) /
    (1 + b[4]! * x! + b[5]! * x! ** 2 + b[6]! * x! ** 3),
  Nelson: (b, [x, z]) => b[0]! - b[1]! * x! * Math.exp(-b[2]! * z!),
  MGH17: (b, [x]) => b[0]! + b[1]! * Math.exp(-b[3]! * x!) + b[2]! * Math.exp(-b[4]! * x!),
  MGH10: (b, [x]) => b[0]! * Math.exp(b[1]! / (x! + b[2]!)),
  Roszman1: (b, [x]) => b[0]! - b[1]! * x! - Math.atan(b[2]! / (x! - b[3]!)) / Math.PI,
  Rat42: (b, [x]) => b[0]! / (1 + Math.exp(b[1]! - b[2]! * x!)),
  Bennett5: (b, [x]) => b[0]! * (b[1]! + x!) ** (-1 / b[2]!),
  Eckerle4: (b, [x]) => (b[0]! / b[1]!) * Math.exp(-0.5 * ((x! - b[2]!) / b[1]!) ** 2),
};

function exponentials(b: ArrayLike<number>, [x]: readonly number[]): number {
  return b[0]! * Math.exp(-b[1]! * x!) + b[2]! * Math.exp(-b[3]! * x!) + b[4]! * Math.exp(-b[5]! * x!);
}

function peaks(b: ArrayLike<number>, [x]: readonly number[]): number {
  const first = b[2]! * Math.exp(-(((x! - b[3]!) / b[4]!) ** 2));
  return b[0]! * Math.exp(-b[1]! * x!) + first + b[5]! * Math.exp(-(((x! - b[6]!) / b[7]!) ** 2));
}
