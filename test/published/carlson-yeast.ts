/**
 * Growth of yeast, hours 0 to 18, amount in arbitrary units.
 *
 * Source: Carlson, T. (1913), Biochemische Zeitschrift 57:313, as tabulated by Pearl, R. (1927), Quarterly Review
 * of Biology 2:532. One text prints 640.9 at hour 14; the table has 640.8.
 */
export const yeast: readonly number[] = [
  9.6, 18.3, 29.0, 47.2, 71.1, 119.1, 174.6, 257.3, 350.7, 441.0, 513.3, 559.7, 594.8, 629.4, 640.8, 651.1,
  655.9, 659.6, 661.8,
];
