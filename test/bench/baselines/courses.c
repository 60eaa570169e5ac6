// The baseline in C for mean animals under weather: the same weather as the kernel's from the same streams of random numbers, and what
// a year makes of it in double precision, sixteen replicates side by side.
//   courses IMAGE REPLICATES SEED > sums      prints one line a replicate: its animals at the end; then the seconds of CPU time
#include "weather.h"

static double *animals, *arrivals;
#define CELL(state, patch, c) ((state) + ((patch) * classes + (c)) * LANES)

static void crowd(const int32_t *record) {
  const double *weights = section(record[3]), *coefficients = section(record[5]);
  for (int patch = 0; patch < patches; patch++) {
    double sum[LANES] = {0}, *target = SLOT(record[7], patch);
    for (int c = 0; c < classes; c++)
      for (int l = 0; l < LANES; l++) sum[l] += weights[c] * CELL(animals, patch, c)[l];
    for (int l = 0; l < LANES; l++) target[l] = 1 / (1 + coefficients[patch] * sum[l]);
  }
}

static void survive(const int32_t *record) {
  const double *table = section(record[3]);
  for (int patch = 0; patch < patches; patch++)
    for (int c = 0; c < classes; c++) {
      double *cell = CELL(animals, patch, c);
      scaledRates(table[patch * classes + c], section(record[4]), c, patch);
      for (int l = 0; l < LANES; l++) cell[l] *= rates[l];
    }
}

static void disperse(const int32_t *record) {
  const int32_t *moves = section(record[3]), *movement = section(record[5]);
  const double *leaving = section(record[4]), *chances = section(movement[2]);
  const int32_t *ways = section(movement[0]), *ends = section(movement[1]);
  memset(arrivals, 0, 8ul * patches * classes * LANES);
  for (int patch = 0; patch < patches; patch++)
    for (int c = 0; c < classes; c++) {
      if (!moves[c]) continue;
      double leavers[LANES], *cell = CELL(animals, patch, c);
      for (int l = 0; l < LANES; l++) leavers[l] = cell[l] * leaving[patch * classes + c], cell[l] -= leavers[l];
      for (int way = ways[patch]; way < ways[patch + 1]; way++) {
        double *target = CELL(arrivals, ends[way], c);
        for (int l = 0; l < LANES; l++) target[l] += leavers[l] * chances[way];
      }
    }
  for (int i = 0; i < patches * classes * LANES; i++) animals[i] += arrivals[i];
}

static void age(const int32_t *record) {
  const int32_t *next = section(record[4]);
  for (int patch = 0; patch < patches; patch++) {
    memset(arrivals, 0, 8ul * classes * LANES);
    for (int c = 0; c < classes; c++)
      if (next[c] >= 0)
        for (int l = 0; l < LANES; l++) arrivals[next[c] * LANES + l] += CELL(animals, patch, c)[l];
    memcpy(CELL(animals, patch, 0), arrivals, 8ul * classes * LANES);
  }
}

static void breed(const int32_t *record) {
  const double *births = section(record[3]);
  for (int patch = 0; patch < patches; patch++) {
    double young[LANES] = {0}, *first = CELL(animals, patch, 0);
    for (int c = 0; c < classes; c++) {
      double rate = births[patch * classes + c];
      if (rate == 0) continue;
      for (int l = 0; l < LANES; l++) young[l] += rate * CELL(animals, patch, c)[l];
    }
    for (int l = 0; l < LANES; l++) first[l] += young[l];
  }
}

static void run(int row) {
  const int32_t *record = section(row), *end = record + entries(row);
  for (; record < end; record += 16) switch (record[0]) {
      case 1: breed(record); break;
      case 2: survive(record); break;
      case 3: age(record); break;
      case 5: disperse(record); break;
      case 7: crowd(record); break;
      case 32: vary(record); break;
      case 96: break;
      default: fprintf(stderr, "no opcode %d here\n", record[0]), exit(1);
    }
}

int main(int argc, char **argv) {
  if (argc < 4) return 2;
  openImage(argv[1], argv[3]);
  size_t cells = (size_t)patches * classes * LANES;
  animals = room(8 * cells), arrivals = room(8 * cells);
  const int32_t *start = section(word(13));
  clock_t began = clock();
  for (int first = 0; first < atoi(argv[2]); first += LANES) {
    for (int l = 0; l < LANES; l++) replicates[l] = first + l;
    for (size_t i = 0; i < cells; i++) animals[i] = start[i / LANES];
    for (step = 1; step <= years; step++) run(word(9)), run(word(10));
    double totals[LANES] = {0};
    for (size_t i = 0; i < cells; i++) totals[i % LANES] += animals[i];
    for (int l = 0; l < LANES && first + l < atoi(argv[2]); l++) printf("%.17g\n", totals[l]);
  }
  printf("seconds %.6f\n", (double)(clock() - began) / CLOCKS_PER_SEC);
  return 0;
}
