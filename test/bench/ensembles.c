/* Hand-written ensembles of x' = r x (1 - x): one path, many without noise, many with a lognormal factor. */
#include <math.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <time.h>

static double now(void) {
  struct timespec t;
  clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &t);
  return t.tv_sec * 1e3 + t.tv_nsec * 1e-6;
}

/* Scalar ziggurat of 256 layers over xoshiro256++, after Marsaglia and Tsang (2000). */
static uint64_t s[4] = {1, 2, 3, 4};
static double edge[257], height[257];
static uint64_t turned(uint64_t x, int k) { return (x << k) | (x >> (64 - k)); }
static uint64_t bits(void) {
  const uint64_t result = turned(s[0] + s[3], 23) + s[0], t = s[1] << 17;
  s[2] ^= s[0];
  s[3] ^= s[1];
  s[1] ^= s[2];
  s[0] ^= s[3];
  s[2] ^= t;
  s[3] = turned(s[3], 45);
  return result;
}
static double part(void) { return ((bits() >> 11) + 0.5) * 0x1p-53; }
static double normal(void) {
  for (;;) {
    const uint64_t word = bits();
    const int layer = word & 255;
    const double u = (double)((int64_t)word >> 11) * 0x1p-52, x = u * edge[layer];
    if (fabs(x) < edge[layer + 1]) return x;
    if (layer == 0) {
      double a, b;
      do {
        a = -log(part()) / edge[1];
        b = -log(part());
      } while (b + b < a * a);
      return u < 0 ? -edge[1] - a : edge[1] + a;
    }
    if (height[layer] + part() * (height[layer + 1] - height[layer]) < exp(-0.5 * x * x)) return x;
  }
}

int main(void) {
  const int paths = 10000, periods = 1000, rounds = 15;
  const double r = 1.5, area = 0.00492867323399, sd = 0.1;
  edge[1] = 3.6541528853610088;
  height[1] = exp(-0.5 * edge[1] * edge[1]);
  edge[0] = area / height[1];
  height[256] = 1;
  for (int k = 2; k < 256; k++) {
    height[k] = height[k - 1] + area / edge[k - 1];
    edge[k] = sqrt(-2 * log(height[k]));
  }
  double *x = malloc(paths * sizeof(double)), least[3] = {1e9, 1e9, 1e9}, sink = 0;
  for (int round = 0; round < rounds; round++) {
    double from = now(), N = 0.3 + 0.01 * round;
    for (int t = 0; t < 1000000; t++) N = 3.7 * N * (1 - N);
    sink += N;
    least[0] = fmin(least[0], now() - from);
    for (int i = 0; i < paths; i++) x[i] = 0.3;
    from = now();
    for (int t = 0; t < periods; t++)
      for (int i = 0; i < paths; i++) x[i] = r * x[i] * (1 - x[i]);
    sink += x[7];
    least[1] = fmin(least[1], now() - from);
    for (int i = 0; i < paths; i++) x[i] = 0.3;
    from = now();
    for (int t = 0; t < periods; t++)
      for (int i = 0; i < paths; i++)
        x[i] = r * x[i] * (1 - x[i]) * exp(-0.5 * sd * sd + sd * normal());
    sink += x[7];
    least[2] = fmin(least[2], now() - from);
  }
  printf("%.6f %.6f %.6f %g\n", least[0], least[1], least[2], sink);
}
