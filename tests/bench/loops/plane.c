/*
 * The energy x distance plane of the detectability integral S, as plain loops: the yardstick of `npm run bench`.
 *
 * S = 2 pi int |C|^2 u du (sphere), 2 l int |C|^2 du (fibre, layer), u from 0 to u_N = 1/(2p),
 * C(u) = -(4 pi/lambda) [Dbeta cos chi + Ddelta sin chi] t(u) MTF(u), chi = pi lambda R' u^2
 * (Pogany, Gao, Wilkins, Rev. Sci. Instrum. 68, 2774 (1997); ICRU Report 54), by Simpson's rule on an even grid.
 * What does not depend on the energy is computed once for each distance. SI units.
 *
 *   plane [intervals, even, 400 unless given] [--values] < input
 *
 * Input: energies distances R1|inf sourceFwhm detectorFwhm pixel size width length, then a row "lambda Ddelta Dbeta"
 * for each energy, then R2 for each distance. Output for each shape: name, milliseconds (median of five), sum of all S;
 * with --values then every S, one a line, energies outside, distances inside.
 */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

#define FWHM_PER_SIGMA 2.354820045
#define PI 3.14159265358979323846
#define RUNS 5

enum { SPHERE, FIBRE, LAYER };
static const char *const NAMES[] = {"sphere", "fibre", "layer"};

static int energies, distances, intervals = 400;
static double r1, source_fwhm, detector_fwhm, pixel, size, width, length;
static double *lambda, *delta, *beta, *r2;

static double sinc(double x) { return x == 0 ? 1 : sin(PI * x) / (PI * x); }

/* Fourier transform of the thickness; the sphere's in two dimensions, the others' across their length. */
static double thickness(int shape, double u) {
  double a = size / 2, q = 2 * PI * a * u;
  if (shape == SPHERE) {
    /* Near 0 the difference would cancel; four terms are exact to 1e-16 there. */
    double f = q < 0.05 ? 1 / 3.0 - q * q / 30 + q * q * q * q / 840 - q * q * q * q * q * q / 45360
                        : (sin(q) - q * cos(q)) / (q * q * q);
    return 4 * PI * a * a * a * f;
  }
  if (shape == FIBRE) return u == 0 ? PI * a * a : a * j1(q) / u;
  return size * width * sinc(width * u);
}

static void plane(int shape, double *chi_per_lambda, double *weight, double *signal) {
  for (int d = 0; d < distances; d++) {
    double m = 1 + r2[d] / r1, spread = r2[d] / m, p = pixel / m, nyquist = 1 / (2 * p), step = nyquist / intervals;
    double from_source = source_fwhm / FWHM_PER_SIGMA * (m - 1) / m, from_detector = detector_fwhm / FWHM_PER_SIGMA / m;
    double variance = from_source * from_source + from_detector * from_detector;
    for (int i = 0; i <= intervals; i++) {
      double u = i * step, simpson = step / 3 * (i == 0 || i == intervals ? 1 : i % 2 ? 4 : 2);
      double c = thickness(shape, u) * exp(-2 * PI * PI * variance * u * u) * sinc(u * p);
      weight[i] = simpson * (shape == SPHERE ? 2 * PI * u : 2 * length) * c * c;
      chi_per_lambda[i] = PI * spread * u * u;
    }
    for (int e = 0; e < energies; e++) {
      double sum = 0, wave = lambda[e], phase = delta[e], absorption = beta[e], k = 4 * PI / wave;
      for (int i = 0; i <= intervals; i++) {
        double chi = chi_per_lambda[i] * wave, c = absorption * cos(chi) + phase * sin(chi);
        sum += weight[i] * c * c;
      }
      signal[e * distances + d] = k * k * sum;
    }
  }
}

static double milliseconds(void) {
  struct timespec now;
  clock_gettime(CLOCK_MONOTONIC, &now);
  return now.tv_sec * 1e3 + now.tv_nsec / 1e6;
}

static int ascending(const void *a, const void *b) {
  double x = *(const double *)a, y = *(const double *)b;
  return (x > y) - (x < y);
}

static double number(void) {
  char text[64];
  if (scanf("%63s", text) != 1) {
    fputs("plane: the input ends early\n", stderr);
    exit(1);
  }
  return strtod(text, NULL);
}

static double *numbers(int count) {
  double *values = malloc(sizeof(double) * (size_t)count);
  if (values == NULL) {
    fputs("plane: no memory\n", stderr);
    exit(1);
  }
  return values;
}

int main(int argc, char **argv) {
  int print_values = 0;
  for (int i = 1; i < argc; i++)
    if (strcmp(argv[i], "--values") == 0) print_values = 1;
    else intervals = atoi(argv[i]);
  if (intervals < 2 || intervals % 2) {
    fputs("plane: intervals must be even, 2 or more\n", stderr);
    return 1;
  }
  energies = (int)number(), distances = (int)number();
  r1 = number(), source_fwhm = number(), detector_fwhm = number(), pixel = number();
  size = number(), width = number(), length = number();
  lambda = numbers(energies), delta = numbers(energies), beta = numbers(energies), r2 = numbers(distances);
  for (int e = 0; e < energies; e++) lambda[e] = number(), delta[e] = number(), beta[e] = number();
  for (int d = 0; d < distances; d++) r2[d] = number();

  double *chi_per_lambda = numbers(intervals + 1), *weight = numbers(intervals + 1);
  double *signal = numbers(energies * distances);
  for (int shape = SPHERE; shape <= LAYER; shape++) {
    double took[RUNS], sum = 0;
    for (int run = 0; run < RUNS; run++) {
      double begun = milliseconds();
      plane(shape, chi_per_lambda, weight, signal);
      took[run] = milliseconds() - begun;
    }
    qsort(took, RUNS, sizeof took[0], ascending);
    for (int i = 0; i < energies * distances; i++) sum += signal[i];
    printf("%s %.4f %.17g\n", NAMES[shape], took[RUNS / 2], sum);
    if (print_values)
      for (int i = 0; i < energies * distances; i++) printf("%.17g\n", signal[i]);
  }
  return 0;
}
