/*
 * The work of one boost candidate point in straightforward C, as a yardstick for the inner loop (cc -O2): every row of
 * the ledger, temperatures of rectifier and switch by the plain fixed-point iteration to 1e-6 K.
 * Reads: seconds, number of slope factors, the factors, number of kernels, 42 numbers of each (see c-reference.ts).
 * Prints: points per second, mean junction temperature in kelvin.
 */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <time.h>

typedef struct {
  double vin, vo, io, f, l, rl, core, ron25, ron_k, slope, tfv, loop, tvr, tfi, stored;
  double ref, self, common, self_sw, i0, v0, qc, cost;
  double c[17];
  double leaks, stores;
} kernel;

static double rows[12];

static double now(void) {
  struct timespec t;
  clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &t);
  return t.tv_sec + 1e-9 * t.tv_nsec;
}

static double drop(double a, double b, double c, double x) {
  if (x >= 0.01) return a + b * log(x) + c * x;
  return (a + b * log(0.01) + c * 0.01) * x / 0.01;
}

static double x_log(double lo, double hi) {
  return 0.5 * (hi * hi * log(hi) - lo * lo * log(lo)) / (hi - lo) - 0.25 * (hi + lo);
}

/* Rows at one pair of temperatures; heat of rectifier and switch. Continuous conduction above the knee of V_F only. */
static void ledger(const kernel *k, double factor, double tj, double ts, double *heat, double *heat_sw) {
  const double *c = k->c, t0 = 298.15, rise = tj - t0;
  double a = c[8] + rise * c[11], b = c[9] + rise * c[12], s = c[10] + rise * c[13];
  double ron = k->ron25 * (1 + k->ron_k * (ts - t0));
  double quad = ron + k->rl, lin = k->vin + k->io * ron, i = k->io * k->vo / k->vin, vf = 0;
  for (int n = 0; n < 60; n++) {
    vf = drop(a, b, s, i / k->i0);
    double con = k->io * (k->vo + vf), next = 2 * con / (lin + sqrt(lin * lin - 4 * quad * con));
    double moved = fabs(next - i);
    i = next;
    if (moved <= 1e-12 * i) break;
  }
  double d = (k->vo + vf + i * k->rl - k->vin) / (k->vo + vf - i * ron), share = 1 - d;
  double ripple = (k->vin - i * quad) * d / (k->l * k->f), valley = i - ripple / 2, peak = i + ripple / 2;
  double lo = valley / k->i0, hi = peak / k->i0;
  double slope = k->slope * factor;
  if (k->loop > 0 && slope > k->vo / k->loop) slope = k->vo / k->loop;
  double e_rect = 0, e_sw = 0, charge = 0;
  if (k->stores) {
    double lt = log(tj / t0), li = log(lo > 0.01 ? lo : 0.01), ls = log(slope / 1e8);
    double tau = exp(c[0] + c[1] * li + c[2] * ls + c[3] * lt);
    double rr = tau / (1 + exp(c[4] + c[5] * li + c[6] * ls + c[7] * lt));
    double ton = share / k->f, m = (peak - valley) / ton;
    double q0 = tau * (valley + m * tau - (peak + m * tau) * exp(-ton / tau));
    double weight = 1 + (tau * valley - q0) / (slope * tau * tau), ta = 0;
    for (int n = 0; n < 60; n++) {
      double e = weight * exp(-(valley / slope + ta) / tau), r = (tau - rr) * (1 - e) - ta;
      double step = r / (1 - (1 - rr / tau) * e);
      ta += step;
      if (fabs(step) <= 1e-13 * ta) break;
    }
    double irm = slope * ta, x = k->tfv / rr, g = x > 0 ? -expm1(-x) / x : 1;
    charge = irm * (ta / 2 + rr);
    e_rect = k->vo * irm * rr * g;
    e_sw = k->vo * (valley * ta + irm * ta / 2 + irm * rr * (1 - g));
  }
  double leak = k->leaks ? exp(c[14] + c[15] * (1 / t0 - 1 / tj) + c[16] * log(k->vo / k->v0)) : 0;
  double square = (valley * valley + valley * peak + peak * peak) / 3;
  rows[0] = k->i0 * (0.5 * a * (lo + hi) + s * (lo * lo + lo * hi + hi * hi) / 3 + b * x_log(lo, hi)) * share;
  rows[1] = e_rect * k->f;
  rows[2] = e_sw * k->f;
  rows[3] = k->qc > 0 && charge < k->qc ? k->cost * (1 - charge / k->qc) * k->f : 0;
  rows[4] = k->vo * leak * d;
  rows[6] = square * d * ron;
  rows[7] = 0.5 * k->vo * valley * (valley / slope + k->tfv) * k->f;
  rows[8] = 0.5 * k->vo * peak * (k->tvr + k->tfi) * k->f;
  rows[9] = k->stored * k->f;
  rows[10] = square * k->rl + k->core;
  *heat = rows[0] + rows[1] + rows[4];
  *heat_sw = rows[2] + rows[3] + rows[6] + rows[7] + rows[8] + rows[9];
}

static double settle(const kernel *k, double factor) {
  double tj = k->ref, ts = k->ref;
  for (int n = 0; n < 400; n++) {
    double heat, heat_sw;
    ledger(k, factor, tj, ts, &heat, &heat_sw);
    double sink = k->ref + k->common * (heat + heat_sw);
    double tj2 = sink + k->self * heat, ts2 = sink + k->self_sw * heat_sw;
    double moved = fabs(tj2 - tj) + fabs(ts2 - ts);
    if (moved <= 1e-6) break;
    tj = tj2;
    ts = ts2;
  }
  return tj;
}

static double number(void) {
  double value;
  if (scanf("%lf", &value) != 1) exit(1);
  return value;
}

int main(void) {
  double seconds = number();
  int factors = (int)number();
  double *factor = malloc(sizeof(double) * factors);
  for (int j = 0; j < factors; j++) factor[j] = number();
  int kernels = (int)number();
  kernel *k = malloc(sizeof(kernel) * kernels);
  for (int j = 0; j < kernels; j++)
    for (unsigned n = 0; n < sizeof(kernel) / sizeof(double); n++) ((double *)&k[j])[n] = number();
  double begun = now(), elapsed = 0, sum = 0, done = 0;
  while (elapsed < seconds) {
    for (int j = 0; j < kernels; j++)
      for (int n = 0; n < factors; n++) sum += settle(&k[j], factor[n]);
    done += (double)kernels * factors;
    elapsed = now() - begun;
  }
  printf("%.17g %.17g\n", done / elapsed, sum / done);
  return 0;
}
