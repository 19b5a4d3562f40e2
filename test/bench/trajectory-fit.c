/*
 * The trajectory fit of  N' = R N / (1 + (R - 1) N / K)  with R, K and N0 unknown, by hand: path, sensitivities and
 * sums of products in one pass, then the same trust-region search as the solver's, written out for three unknowns.
 * Prints the least microseconds a fit, the evaluations, and the estimates. Arguments: the observed values.
 */
#include <float.h>
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

enum { P = 3 };
static double y[256];
static int n;

static double evaluate(const double *b, double *gram, double *slope) {
  double R = b[0], K = b[1], s = b[2], dR = 0, dK = 0, d0 = 1, sum = 0;
  double g00 = 0, g01 = 0, g02 = 0, g11 = 0, g12 = 0, g22 = 0, h0 = 0, h1 = 0, h2 = 0;
  for (int t = 0;; t++) {
    double r = y[t] - s;
    sum += r * r;
    h0 -= dR * r; h1 -= dK * r; h2 -= d0 * r;
    g00 += dR * dR; g01 += dR * dK; g02 += dR * d0;
    g11 += dK * dK; g12 += dK * d0; g22 += d0 * d0;
    if (t == n - 1) break;
    double crowding = (R - 1) * s / K;
    double below = 1 + crowding;
    double next = R * s / below;
    double inverse = 1 / below;
    double by = (R - next * ((R - 1) / K)) * inverse;
    dR = by * dR + (s - next * (s / K)) * inverse;
    dK = by * dK + next * (crowding / K) * inverse;
    d0 = by * d0;
    s = next;
  }
  gram[0] = g00; gram[1] = g01; gram[2] = g02; gram[4] = g11; gram[5] = g12; gram[8] = g22;
  slope[0] = h0; slope[1] = h1; slope[2] = h2;
  return sum;
}

static int factor(const double *gram, const double *slope, double *T, double *z) {
  for (int a = 0; a < P; a++) {
    double above = 0;
    for (int k = 0; k < a; k++) above += T[k * P + a] * T[k * P + a];
    double pivot = gram[a * P + a] - above;
    if (!isfinite(pivot)) return 0;
    double root = pivot > 4 * DBL_EPSILON * gram[a * P + a] ? sqrt(pivot) : 0;
    double inverse = root > 0 ? 1 / root : 0, right = slope[a];
    for (int k = 0; k < a; k++) right -= T[k * P + a] * z[k];
    z[a] = right * inverse;
    T[a * P + a] = root;
    for (int b = a + 1; b < P; b++) {
      double product = 0;
      for (int k = 0; k < a; k++) product += T[k * P + a] * T[k * P + b];
      T[a * P + b] = (gram[a * P + b] - product) * inverse;
    }
  }
  return 1;
}

static double length(const double *D, const double *d) {
  double sum = 0;
  for (int i = 0; i < P; i++) sum += D[i] * d[i] * D[i] * d[i];
  return sqrt(sum);
}

static void substitute(const double *T, const double *z, double *d) {
  for (int i = P - 1; i >= 0; i--) {
    double sum = -z[i];
    for (int j = i + 1; j < P; j++) sum -= T[i * P + j] * d[j];
    d[i] = sum / T[i * P + i];
  }
}

static void rotate(double *T, double *z, double *row, int from) {
  double carried = 0;
  for (int k = from; k < P; k++) {
    double below = row[k], above = T[k * P + k];
    if (below == 0) continue;
    double l = sqrt(above * above + below * below), c = above / l, s = below / l, kept = z[k];
    T[k * P + k] = l;
    z[k] = c * kept + s * carried;
    carried = c * carried - s * kept;
    for (int i = k + 1; i < P; i++) {
      double upper = T[k * P + i], lower = row[i];
      T[k * P + i] = c * upper + s * lower;
      row[i] = c * lower - s * upper;
    }
  }
}

static double correction(const double *D, const double *d, const double *T, double l, double radius) {
  double sum = 0, w[P];
  for (int i = 0; i < P; i++) {
    double value = D[i] * D[i] * d[i] / l;
    for (int k = 0; k < i; k++) value -= T[k * P + i] * w[k];
    w[i] = value / T[i * P + i];
    sum += w[i] * w[i];
  }
  return (l - radius) / radius / sum;
}

static double region(const double *T, const double *z, const double *D, double radius, double guess, double *d) {
  substitute(T, z, d);
  double l = length(D, d);
  if (l <= 1.1 * radius) return 0;
  double steep = 0;
  for (int j = 0; j < P; j++) {
    double value = 0;
    for (int i = 0; i <= j; i++) value += T[i * P + j] * z[i];
    steep += value / D[j] * (value / D[j]);
  }
  steep = sqrt(steep);
  double first = correction(D, d, T, l, radius), low = isfinite(first) ? first : 0, high = steep / radius;
  double damping = fmin(fmax(guess, low), high);
  if (damping == 0) damping = steep / (l + radius);
  for (int round = 0; round < 12; round++) {
    double S[P * P], q[P], row[P], root = sqrt(damping);
    memcpy(S, T, sizeof S);
    memcpy(q, z, sizeof q);
    for (int j = 0; j < P; j++) {
      for (int i = j + 1; i < P; i++) row[i] = 0;
      row[j] = root * D[j];
      rotate(S, q, row, j);
    }
    substitute(S, q, d);
    l = length(D, d);
    if (fabs(l - radius) <= 0.1 * radius) break;
    if (l > radius) low = fmax(low, damping); else high = fmin(high, damping);
    damping = fmin(fmax(damping + correction(D, d, S, l, radius), low), high);
  }
  return damping;
}

static void grow(double *D, const double *T) {
  for (int j = 0; j < P; j++) {
    double sum = 0;
    for (int i = 0; i <= j; i++) sum += T[i * P + j] * T[i * P + j];
    D[j] = fmax(D[j], sqrt(sum));
    if (D[j] == 0) D[j] = 1;
  }
}

static int fit(double *b) {
  double gram[P * P], slope[P], T[P * P], z[P], D[P] = {0}, d[P], trial[P];
  int calls = 1;
  double sum = evaluate(b, gram, slope);
  if (!factor(gram, slope, T, z)) return 0;
  grow(D, T);
  double radius = 100 * length(D, b), damping = 0, last = INFINITY;
  while (sqrt(z[0] * z[0] + z[1] * z[1] + z[2] * z[2]) > 1e-10 * sqrt(sum) && calls <= 1000) {
    damping = region(T, z, D, radius, damping, d);
    double l = length(D, d);
    if (calls == 1) radius = fmin(radius, l);
    for (int j = 0; j < P; j++) trial[j] = b[j] + d[j];
    double next = evaluate(trial, gram, slope);
    calls++;
    double actual = next < 100 * sum ? 1 - next / sum : -1, predicted = 0, steep = 0;
    for (int i = 0; i < P; i++) {
      double moved = 0;
      for (int j = i; j < P; j++) moved += T[i * P + j] * d[j];
      predicted -= moved * (2 * z[i] + moved) / sum;
      steep += z[i] * moved;
    }
    if (damping == 0 && predicted <= 1e-9) {
      if (actual < -1e-9 || l > 0.95 * last) break;
      last = l;
    } else {
      double ratio = predicted > 0 ? actual / predicted : 0;
      if (ratio <= 0.25) {
        double cut = actual >= 0 ? 0.5 : actual <= -1 ? 0.1 : 0.5 * steep / (steep + 0.5 * actual * sum);
        cut = cut > 0.1 ? fmin(cut, 0.5) : 0.1;
        radius = cut * fmin(radius, 10 * l);
        damping /= cut;
      } else if (damping == 0 || ratio >= 0.75) {
        radius = 2 * l;
        damping *= 0.5;
      }
      if (ratio < 1e-4) {
        if (radius <= 1e-13 * length(D, b)) break;
        continue;
      }
    }
    memcpy(b, trial, sizeof trial);
    sum = next;
    if (!factor(gram, slope, T, z)) break;
    grow(D, T);
    if (l <= 1e-13 * length(D, b)) break;
  }
  return calls;
}

int main(int count, char **arguments) {
  n = count - 1;
  for (int i = 0; i < n; i++) y[i] = atof(arguments[i + 1]);
  double least = INFINITY, b[P];
  int calls = 0, fits = 1000;
  for (int round = 0; round < 60; round++) {
    struct timespec from, to;
    clock_gettime(CLOCK_MONOTONIC, &from);
    for (int i = 0; i < fits; i++) {
      b[0] = 1.5; b[1] = 500; b[2] = 15;
      calls = fit(b);
    }
    clock_gettime(CLOCK_MONOTONIC, &to);
    least = fmin(least, ((to.tv_sec - from.tv_sec) * 1e9 + (to.tv_nsec - from.tv_nsec)) / 1e3 / fits);
  }
  printf("%.6f %d %.15g %.15g %.15g\n", least, calls, b[0], b[1], b[2]);
  return 0;
}
