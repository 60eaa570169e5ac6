// The baseline in C for the path without chance: for each set of parameters survival, dispersal between all patches, ageing, breeding
// and crowding, with arrays of its own.   path NUMBERS SETS: animals at the end of each set a line, then the seconds of CPU time
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

static double *read(FILE *file, const char *name, int *count) {
  char found[64];
  rewind(file);
  while (fscanf(file, "%63s %d", found, count) == 2) {
    double *values = aligned_alloc(64, (8ul * *count + 127) / 64 * 64);
    for (int i = 0; i < *count; i++)
      if (fscanf(file, "%lf", values + i) != 1) exit(1);
    if (strcmp(found, name) == 0) return values;
    free(values);
  }
  fprintf(stderr, "no %s\n", name);
  exit(1);
}

/** What set s multiplies survival, births and chances to arrive by. */
static double less(int s, int step) { return 1 - 0.001 * (s * step % 100); }

int main(int argc, char **argv) {
  if (argc < 3) return 2;
  FILE *file = fopen(argv[1], "r");
  int count, sets = atoi(argv[2]);
  double *shape = read(file, "shape", &count);
  int P = shape[0], C = shape[1], years = shape[2];
  double *start = read(file, "start", &count), *survival = read(file, "survival", &count), *births = read(file, "births", &count);
  double *crowding = read(file, "crowding", &count), *leaving = read(file, "leaving", &count);
  double *ways = read(file, "ways", &count), *ends = read(file, "ends", &count), *chances = read(file, "chances", &count);
  double *n = aligned_alloc(64, 8ul * P * C), *lives = aligned_alloc(64, 8ul * P * C), *young = aligned_alloc(64, 8ul * P * C);
  double *moves = aligned_alloc(64, 8ul * P * P), *arrived = aligned_alloc(64, (8ul * P + 63) / 64 * 64);
  clock_t began = clock();
  for (int s = 0; s < sets; s++) {
    memcpy(n, start, 8ul * P * C);
    for (int i = 0; i < P * C; i++) lives[i] = survival[i] * less(s, 3), young[i] = births[i] * less(s, 7);
    memset(moves, 0, 8ul * P * P);
    for (int p = 0; p < P; p++)
      for (int w = ways[p]; w < (int)ways[p + 1]; w++) moves[p * P + (int)ends[w]] = chances[w] * less(s, 11);
    for (int year = 0; year < years; year++) {
      for (int p = 0; p < P; p++) {
        double *row = n + p * C, all = 0;
        for (int c = 0; c < C; c++) all += row[c];
        for (int c = 0; c < C; c++) row[c] *= lives[p * C + c];
        row[0] /= 1 + crowding[p] * all;
      }
      memset(arrived, 0, 8ul * P);
      for (int p = 0; p < P; p++) {
        double leavers = n[p * C] * leaving[p * C];
        n[p * C] -= leavers;
        for (int to = 0; to < P; to++) arrived[to] += leavers * moves[p * P + to];
      }
      for (int p = 0; p < P; p++) {
        double *row = n + p * C, born = 0;
        row[0] += arrived[p];
        row[C - 1] += row[C - 2];
        for (int c = C - 2; c > 0; c--) row[c] = row[c - 1];
        row[0] = 0;
        for (int c = 0; c < C; c++) born += row[c] * young[p * C + c];
        row[0] = born;
      }
    }
    double all = 0;
    for (int i = 0; i < P * C; i++) all += n[i];
    printf("%.12g\n", all);
  }
  printf("seconds %.6f\n", (double)(clock() - began) / CLOCKS_PER_SEC);
  return 0;
}
