/*
 * The yardstick: the plain recursion of a conditional loss law, eight factor values side by side, as a careful C programmer
 * writes it. Started with the file of a case; answers each line on standard input with the nanoseconds of one run, and the
 * line "values" with the expected minima themselves. gcc -O3 -march=native -o recursion recursion.c -lm
 */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

#define LANES 8
#define NEGLIGIBLE 1e-18

typedef double lanes __attribute__((vector_size(64)));

typedef struct {
  double rho;
  int strikes;
  const double *strike; /* in steps */
} job_t;

static int names, dates, points, jobs;
static double unit;
static const double *amount, *threshold, *point, *weight;
static job_t job[16];
static int *steps;
static double *part;
static lanes *rows, *probability;
static int below;

static const double *read_case(const char *path) {
  FILE *file = fopen(path, "rb");
  if (!file) exit(1);
  fseek(file, 0, SEEK_END);
  long size = ftell(file);
  rewind(file);
  double *all = malloc(size);
  if (fread(all, 1, size, file) != (size_t)size) exit(1);
  fclose(file);
  return all;
}

static void load(const char *path) {
  const double *at = read_case(path);
  names = (int)at[0], dates = (int)at[1], points = (int)at[2], jobs = (int)at[3], unit = at[4];
  amount = at + 5, threshold = amount + names, point = threshold + names * dates, weight = point + points;
  at = weight + points;
  int top = 0;
  for (int j = 0; j < jobs; j++) {
    job[j].rho = at[0], job[j].strikes = (int)at[1], job[j].strike = at + 2;
    for (int s = 0; s < job[j].strikes; s++) top = fmax(top, ceil(job[j].strike[s]));
    at += 2 + job[j].strikes;
  }
  steps = malloc(names * sizeof *steps), part = malloc(names * sizeof *part);
  for (int i = 0; i < names; i++) {
    steps[i] = (int)(amount[i] + 1e-9);
    part[i] = fmax(0, amount[i] - steps[i]);
    if (part[i] < 1e-9) part[i] = 0;
    if (steps[i] + 2 > below) below = steps[i] + 2;
  }
  rows = (lanes *)aligned_alloc(64, (top + 2 * below + 2) * sizeof(lanes)) + below;
  probability = aligned_alloc(64, names * sizeof(lanes));
}

/* Phi every 1/64 from -9 to 9 and a Taylor step of degree five, as the kernel itself does it: the recursion is what is timed. */
#define NODES (18 * 64 + 1)
static double cdf[NODES], density[NODES];

static void tabulate(void) {
  for (int j = 0; j < NODES; j++) {
    double x = j / 64.0 - 9;
    cdf[j] = 0.5 * erfc(-x * M_SQRT1_2), density[j] = exp(-0.5 * x * x) / sqrt(2 * M_PI);
  }
}

static inline double normal(double x) {
  x = x < -8.99 ? -8.99 : x > 8.99 ? 8.99 : x;
  int j = (int)(x * 64 + 576.5);
  double near = j / 64.0 - 9, d = x - near, square = near * near;
  double fourth = near * (3 - square) / 24 + d * ((square - 6) * square + 3) / 120;
  return cdf[j] + density[j] * d * (1 + d * (-0.5 * near + d * ((square - 1) / 6 + d * fourth)));
}

static int is_negligible(const lanes *row) {
  for (int k = 0; k < LANES; k++)
    if ((*row)[k] >= NEGLIGIBLE) return 0;
  return 1;
}

/* The law of eight factor values up to `top` steps; its support in *low and *high. */
static void law(int top, int *low, int *high) {
  memset(rows - below, 0, (top + 1 + 2 * below) * sizeof(lanes));
  rows[0] = (lanes){} + 1;
  *low = *high = 0;
  for (int i = 0; i < names; i++) {
    lanes p = probability[i], second = p * part[i], first = p - second, stay = 1 - p;
    *high += steps[i] + (part[i] > 0);
    if (*high > top) *high = top;
    lanes *source = rows - steps[i];
    if (part[i] > 0) {
      lanes upper = source[*high];
      for (int u = *high; u >= *low; u--) {
        lanes lower = source[u - 1];
        rows[u] = stay * rows[u] + first * upper + second * lower;
        upper = lower;
      }
    } else {
      for (int u = *high; u >= *low; u--) rows[u] = stay * rows[u] + first * source[u];
    }
    for (; *high > *low && is_negligible(rows + *high); (*high)--) rows[*high] = (lanes){};
    for (; *low < *high && is_negligible(rows + *low); (*low)++) rows[*low] = (lanes){};
  }
}

/* E[min(L, K)] = K − E[(K − L)⁺] for every job, date and strike. */
static void run(double *out) {
  for (int j = 0; j < jobs; j++) {
    double loading = sqrt(job[j].rho), scale = 1 / sqrt(1 - job[j].rho);
    int top = 0;
    for (int s = 0; s < job[j].strikes; s++) top = fmax(top, ceil(job[j].strike[s]) - 1);
    for (int t = 0; t < dates; t++, out += job[j].strikes) {
      for (int s = 0; s < job[j].strikes; s++) out[s] = unit * job[j].strike[s];
      for (int k = 0; k < points; k += LANES) {
        for (int i = 0; i < names; i++)
          for (int lane = 0; lane < LANES; lane++) {
            double x = (threshold[i * dates + t] - loading * point[k + lane]) * scale;
            probability[i][lane] = normal(x);
          }
        int low, high;
        law(top, &low, &high);
        for (int s = 0; s < job[j].strikes; s++) {
          double strike = job[j].strike[s];
          lanes sum = {};
          for (int u = low; u <= high && u < strike; u++) sum += (strike - u) * rows[u];
          for (int lane = 0; lane < LANES; lane++) out[s] -= unit * weight[k + lane] * sum[lane];
        }
      }
    }
  }
}

int main(int count, char **arguments) {
  if (count < 2) return 2;
  load(arguments[1]);
  tabulate();
  int values = 0;
  for (int j = 0; j < jobs; j++) values += job[j].strikes * dates;
  double *out = malloc(values * sizeof *out);
  char line[64];
  while (fgets(line, sizeof line, stdin)) {
    struct timespec before, after;
    clock_gettime(CLOCK_MONOTONIC, &before);
    run(out);
    clock_gettime(CLOCK_MONOTONIC, &after);
    if (!strncmp(line, "values", 6))
      for (int i = 0; i < values; i++) printf("%.17g ", out[i]);
    else
      printf("%.0f", (after.tv_sec - before.tv_sec) * 1e9 + (after.tv_nsec - before.tv_nsec));
    printf("\n");
    fflush(stdout);
  }
  return 0;
}
