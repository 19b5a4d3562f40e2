/*
 * Normal values and lognormal factors, many at a time. Build: noise-kernel-build.sh.
 *
 * Random bits: xoshiro256++ (Blackman and Vigna 2021, ACM TOMS 47:36).
 * Normal values: ziggurat of 256 layers (Marsaglia and Tsang 2000, J. Stat. Softw. 5:8), with separate bits for
 * layer, sign and place, and the tail by Marsaglia (1964).
 * Exponentials: argument reduced by multiples of ln 2/64, a table of 64 powers of 2 and a Taylor polynomial of
 * degree 5; error below 2 units in the last place. No library is linked, so the same digits come out wherever it runs.
 */
#include <stdint.h>
#include <wasm_simd128.h>

#define CAPACITY 4096
#define LAYERS 256
static const double TAIL = 3.6541528853610088;
static const double AREA = 0.00492867323399;

/* Kept in plain variables inside loops: an array whose place is handed on would live in memory. */
typedef struct {
  uint64_t a, b, c, d;
} Words;

static Words state;
static double values[CAPACITY + 2];
static double edge[LAYERS + 1], height[LAYERS + 1];
static double widths[LAYERS];
static uint64_t inside[LAYERS];

Words *state_place(void) { return &state; }
double *values_place(void) { return values; }

static inline uint64_t turned(uint64_t x, int k) { return (x << k) | (x >> (64 - k)); }

static inline uint64_t bits(Words *s) {
  const uint64_t result = turned(s->a + s->d, 23) + s->a;
  const uint64_t t = s->b << 17;
  s->c ^= s->a;
  s->d ^= s->b;
  s->b ^= s->c;
  s->a ^= s->d;
  s->c ^= t;
  s->d = turned(s->d, 45);
  return result;
}

/* 2^(k/64), correctly rounded, as bits. */
static const uint64_t powers[64] = {
  0x3ff0000000000000, 0x3ff02c9a3e778061, 0x3ff059b0d3158574, 0x3ff0874518759bc8, 0x3ff0b5586cf9890f,
  0x3ff0e3ec32d3d1a2, 0x3ff11301d0125b51, 0x3ff1429aaea92de0, 0x3ff172b83c7d517b, 0x3ff1a35beb6fcb75,
  0x3ff1d4873168b9aa, 0x3ff2063b88628cd6, 0x3ff2387a6e756238, 0x3ff26b4565e27cdd, 0x3ff29e9df51fdee1,
  0x3ff2d285a6e4030b, 0x3ff306fe0a31b715, 0x3ff33c08b26416ff, 0x3ff371a7373aa9cb, 0x3ff3a7db34e59ff7,
  0x3ff3dea64c123422, 0x3ff4160a21f72e2a, 0x3ff44e086061892d, 0x3ff486a2b5c13cd0, 0x3ff4bfdad5362a27,
  0x3ff4f9b2769d2ca7, 0x3ff5342b569d4f82, 0x3ff56f4736b527da, 0x3ff5ab07dd485429, 0x3ff5e76f15ad2148,
  0x3ff6247eb03a5585, 0x3ff6623882552225, 0x3ff6a09e667f3bcd, 0x3ff6dfb23c651a2f, 0x3ff71f75e8ec5f74,
  0x3ff75feb564267c9, 0x3ff7a11473eb0187, 0x3ff7e2f336cf4e62, 0x3ff82589994cce13, 0x3ff868d99b4492ed,
  0x3ff8ace5422aa0db, 0x3ff8f1ae99157736, 0x3ff93737b0cdc5e5, 0x3ff97d829fde4e50, 0x3ff9c49182a3f090,
  0x3ffa0c667b5de565, 0x3ffa5503b23e255d, 0x3ffa9e6b5579fdbf, 0x3ffae89f995ad3ad, 0x3ffb33a2b84f15fb,
  0x3ffb7f76f2fb5e47, 0x3ffbcc1e904bc1d2, 0x3ffc199bdd85529c, 0x3ffc67f12e57d14b, 0x3ffcb720dcef9069,
  0x3ffd072d4a07897c, 0x3ffd5818dcfba487, 0x3ffda9e603db3285, 0x3ffdfc97337b9b5f, 0x3ffe502ee78b3ff6,
  0x3ffea4afa2a490da, 0x3ffefa1bee615a27, 0x3fff50765b6e4540, 0x3fffa7c1819e90d8,
};
/* ln 2/64 in two parts; the first has room for exact products with whole numbers. */
static const double STEP_HIGH = 0x1.62e42fee00000p-7, STEP_LOW = 0x1.a39ef35793c76p-39;

/* Two exponentials at once; arguments from -700 to 700, others are held to these ends. */
static inline v128_t exponentials(v128_t x) {
  x = wasm_f64x2_pmax(wasm_f64x2_pmin(x, wasm_f64x2_splat(700)), wasm_f64x2_splat(-700));
  /* Adding and taking away 1.5 * 2^52 rounds to a whole number, whose bits are then in the low part. */
  const v128_t shift = wasm_f64x2_splat(6755399441055744.0);
  const v128_t shifted = wasm_f64x2_add(wasm_f64x2_mul(x, wasm_f64x2_splat(92.332482616893657)), shift);
  const v128_t n = wasm_f64x2_sub(shifted, shift);
  v128_t r = wasm_f64x2_sub(x, wasm_f64x2_mul(n, wasm_f64x2_splat(STEP_HIGH)));
  r = wasm_f64x2_sub(r, wasm_f64x2_mul(n, wasm_f64x2_splat(STEP_LOW)));
  const v128_t table = wasm_i64x2_make(powers[wasm_i64x2_extract_lane(shifted, 0) & 63],
                                       powers[wasm_i64x2_extract_lane(shifted, 1) & 63]);
  const v128_t scale = wasm_i64x2_add(table, wasm_i64x2_shl(wasm_i64x2_shr(shifted, 6), 52));
  const v128_t r2 = wasm_f64x2_mul(r, r);
  const v128_t high = wasm_f64x2_add(wasm_f64x2_splat(1.0 / 24), wasm_f64x2_mul(r, wasm_f64x2_splat(1.0 / 120)));
  const v128_t low = wasm_f64x2_add(wasm_f64x2_splat(0.5), wasm_f64x2_mul(r, wasm_f64x2_splat(1.0 / 6)));
  const v128_t p = wasm_f64x2_add(r, wasm_f64x2_mul(r2, wasm_f64x2_add(low, wasm_f64x2_mul(r2, high))));
  return wasm_f64x2_add(scale, wasm_f64x2_mul(scale, p));
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

static double part(void) { return ((double)(bits(&state) >> 11) + 0.5) * 0x1p-53; }

static double tail(void) {
  for (;;) {
    const double x = -logarithm(part()) / TAIL, y = -logarithm(part());
    if (y + y > x * x) return TAIL + x;
  }
}

/* The rare case: the place lies beyond what is inside the layer for certain. */
static __attribute__((noinline)) double beyond(int layer, double x) {
  for (;;) {
    if (layer == 0) return tail();
    const double y = height[layer] + part() * (height[layer + 1] - height[layer]);
    if (y < exponential(-0.5 * x * x)) return x;
    const uint64_t word = bits(&state);
    const uint64_t place = word >> 12;
    layer = word & 255;
    x = (double)place * widths[layer];
    if (place < inside[layer]) return x;
  }
}

void normals(int count) {
  Words s = state;
  for (int k = 0; k < count; k++) {
    const uint64_t word = bits(&s);
    const int layer = word & 255;
    const uint64_t place = word >> 12;
    double x = (double)(int64_t)place * widths[layer];
    if (__builtin_expect(place >= inside[layer], 0)) {
      state = s;
      x = beyond(layer, x);
      s = state;
    }
    union { double value; uint64_t word; } u = {x};
    u.word |= (word & 256) << 55;
    values[k] = u.value;
  }
  state = s;
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
