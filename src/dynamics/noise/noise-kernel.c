/*
 * Normal values and lognormal factors, many at a time. Build: noise-kernel-build.mjs.
 *
 * Random bits: xoshiro256++ (Blackman and Vigna 2021, ACM TOMS 47:36).
 * Normal values: ziggurat of 256 layers (Marsaglia and Tsang 2000, J. Stat. Softw. 5:8), with separate bits for
 * layer, sign and place, and the tail by Marsaglia (1964).
 * Exponentials: argument reduced by multiples of ln 2, then a Taylor polynomial of degree 13; error below 2 units in
 * the last place. No library is linked, so the same digits come out wherever it runs.
 */
#include <stdint.h>
#include <wasm_simd128.h>

#define CAPACITY 4096
#define LAYERS 256
static const double TAIL = 3.6541528853610088;
static const double AREA = 0.00492867323399;

static uint64_t state[4];
static double values[CAPACITY + 2];
static double edge[LAYERS + 1], height[LAYERS + 1];
static double widths[LAYERS];
static uint64_t inside[LAYERS];

uint64_t *state_place(void) { return state; }
double *values_place(void) { return values; }

static inline uint64_t turned(uint64_t x, int k) { return (x << k) | (x >> (64 - k)); }

static inline uint64_t bits(uint64_t s[4]) {
  const uint64_t result = turned(s[0] + s[3], 23) + s[0];
  const uint64_t t = s[1] << 17;
  s[2] ^= s[0];
  s[3] ^= s[1];
  s[1] ^= s[2];
  s[0] ^= s[3];
  s[2] ^= t;
  s[3] = turned(s[3], 45);
  return result;
}

static const double LN2_HIGH = 6.93147180369123816490e-01, LN2_LOW = 1.90821492927058770002e-10;

/* Two exponentials at once; arguments from -700 to 700, others are held to these ends. */
static inline v128_t exponentials(v128_t x) {
  x = wasm_f64x2_pmax(wasm_f64x2_pmin(x, wasm_f64x2_splat(700)), wasm_f64x2_splat(-700));
  /* Adding and taking away 1.5 * 2^52 rounds to a whole number, whose bits are then in the low part. */
  const v128_t shift = wasm_f64x2_splat(6755399441055744.0);
  const v128_t shifted = wasm_f64x2_add(wasm_f64x2_mul(x, wasm_f64x2_splat(1.4426950408889634)), shift);
  const v128_t n = wasm_f64x2_sub(shifted, shift);
  v128_t r = wasm_f64x2_sub(x, wasm_f64x2_mul(n, wasm_f64x2_splat(LN2_HIGH)));
  r = wasm_f64x2_sub(r, wasm_f64x2_mul(n, wasm_f64x2_splat(LN2_LOW)));
  static const double c[14] = {1.0, 1.0, 1.0 / 2, 1.0 / 6, 1.0 / 24, 1.0 / 120, 1.0 / 720, 1.0 / 5040,
                               1.0 / 40320, 1.0 / 362880, 1.0 / 3628800, 1.0 / 39916800, 1.0 / 479001600,
                               1.0 / 6227020800.0};
#define PAIR(k) wasm_f64x2_add(wasm_f64x2_splat(c[k]), wasm_f64x2_mul(r, wasm_f64x2_splat(c[k + 1])))
  const v128_t r2 = wasm_f64x2_mul(r, r), r4 = wasm_f64x2_mul(r2, r2), r8 = wasm_f64x2_mul(r4, r4);
#define JOIN(a, b, by) wasm_f64x2_add(a, wasm_f64x2_mul(b, by))
  const v128_t low = JOIN(JOIN(PAIR(0), PAIR(2), r2), JOIN(PAIR(4), PAIR(6), r2), r4);
  const v128_t high = JOIN(JOIN(PAIR(8), PAIR(10), r2), PAIR(12), r4);
  const v128_t p = JOIN(low, high, r8);
  return wasm_i64x2_add(p, wasm_i64x2_shl(shifted, 52));
}

static double exponential(double x) {
  return wasm_f64x2_extract_lane(exponentials(wasm_f64x2_splat(x)), 0);
}

/* Natural logarithm by Newton's method on the exponential; used for tables and tails only. */
static double logarithm(double x) {
  union { double value; uint64_t word; } u = {x};
  const int power = (int)((u.word >> 52) & 0x7ff) - 1023;
  double y = power * 0.6931471805599453 + 0.35;
  for (int k = 0; k < 6; k++) {
    const double e = exponential(y);
    y += 2 * (x - e) / (x + e);
  }
  return y;
}

/* Edges and heights of the layers of exp(-x^2/2); layer 0 holds the tail. */
void prepare(void) {
  edge[LAYERS] = 0;
  height[LAYERS] = 1;
  edge[1] = TAIL;
  height[1] = exponential(-0.5 * TAIL * TAIL);
  edge[0] = AREA / height[1];
  height[0] = 0;
  for (int k = 2; k < LAYERS; k++) {
    height[k] = height[k - 1] + AREA / edge[k - 1];
    edge[k] = __builtin_sqrt(-2 * logarithm(height[k]));
  }
  for (int k = 0; k < LAYERS; k++) {
    widths[k] = edge[k] * 0x1p-52;
    inside[k] = (uint64_t)(edge[k + 1] / edge[k] * 0x1p52);
  }
}

static inline double part(uint64_t s[4]) { return ((double)(bits(s) >> 11) + 0.5) * 0x1p-53; }

static double tail(uint64_t s[4]) {
  for (;;) {
    const double x = -logarithm(part(s)) / TAIL, y = -logarithm(part(s));
    if (y + y > x * x) return TAIL + x;
  }
}

/* The rare case: the place lies beyond what is inside the layer for certain. */
static __attribute__((noinline)) double beyond(uint64_t s[4], int layer, double x) {
  for (;;) {
    if (layer == 0) return tail(s);
    const double y = height[layer] + part(s) * (height[layer + 1] - height[layer]);
    if (y < exponential(-0.5 * x * x)) return x;
    const uint64_t word = bits(s);
    const uint64_t place = word >> 12;
    layer = word & 255;
    x = (double)place * widths[layer];
    if (place < inside[layer]) return x;
  }
}

void normals(int count) {
  uint64_t s[4] = {state[0], state[1], state[2], state[3]};
  for (int k = 0; k < count; k++) {
    const uint64_t word = bits(s);
    const int layer = word & 255;
    const uint64_t place = word >> 12;
    double x = (double)(int64_t)place * widths[layer];
    if (__builtin_expect(place >= inside[layer], 0)) x = beyond(s, layer, x);
    union { double value; uint64_t word; } u = {x};
    u.word |= (word & 256) << 55;
    values[k] = u.value;
  }
  for (int k = 0; k < 4; k++) state[k] = s[k];
}

/* exp(centre + sd z) for normal z. */
void factors(int count, double centre, double sd) {
  normals(count);
  const v128_t c = wasm_f64x2_splat(centre), w = wasm_f64x2_splat(sd);
  for (int k = 0; k < count; k += 2) {
    const v128_t z = wasm_v128_load(values + k);
    wasm_v128_store(values + k, exponentials(wasm_f64x2_add(c, wasm_f64x2_mul(w, z))));
  }
}
