// The baseline in C for runs with weather and whole animals: the same algorithm as the kernel, on the same image, with the same
// streams of random numbers, so that its counts must be the kernel's own.
//   animals IMAGE REPLICATES SEED > sums      prints one line a replicate: its animals at the end; then the seconds of CPU time
#include "weather.h"

static int32_t *animals, *arrivals;
static int32_t counts[LANES] __attribute__((aligned(64)));
#define CELL(state, patch, c) ((state) + ((patch) * classes + (c)) * LANES)

static inline int any(u64v x) {
#if V == 8
  return _mm512_test_epi64_mask((__m512i)x, (__m512i)x) != 0;
#elif V == 4
  return !_mm256_testz_si256((__m256i)x, (__m256i)x);
#else
  return !_mm_testz_si128((__m128i)x, (__m128i)x);
#endif
}

static u64 masks[65];

static inline u64v bits(u64v undecided, f64v p, u64v a, u64v b) {
  f64v onePlus = p + 1;
  u64v sure = (u64v)(onePlus >= 2), digits = (u64v)onePlus << 12, successes = undecided & sure;
  undecided &= ~sure;
  for (int w = 0; w < 7 || any(undecided); w++) {
    u64v sum = a + b, word = ((sum << 17) | (sum >> 47)) + a, t = a ^ b;
    a = ((a << 49) | (a >> 15)) ^ t ^ (t << 21);
    b = (t << 28) | (t >> 36);
    u64v digit = (u64v)((i64v)digits < 0);
    digits += digits;
    successes |= undecided & ~word & digit;
    undecided &= ~(word ^ digit);
  }
  return successes;
}

/** Up to 128 trials; these workloads have no more. */
static int binomial(int n, double p, u64 w0, u64 w1, u64 stream) {
  if (n == 0 || p <= 0) return 0;
  if (p >= 1) return n;
  if (n > 128) fprintf(stderr, "more than 128 trials\n"), exit(1);
  int total = 0;
  for (int block = 0; block < 2; block++) {
    int here = block == 0 ? (n < 64 ? n : 64) : (n > 64 ? n - 64 : 0);
    u64 own = stream + (block ? 0xd1b54a32d192ed03u : 0), a = finalise(w0 + own), b = finalise(w1 + own);
    union { double d; u64 u; } onePlus = {1 + p};
    u64 undecided = masks[here], digits = onePlus.u << 12, successes = 0;
    if (onePlus.d >= 2) { total += here; continue; }
    while (undecided) {
      u64 word = firstWord(a, b), t = a ^ b, digit = (digits >> 63) ? ~(u64)0 : 0;
      a = rotl(a, 49) ^ t ^ (t << 21), b = rotl(t, 28), digits <<= 1;
      successes |= undecided & ~word & digit;
      undecided &= ~(word ^ digit);
    }
    total += __builtin_popcountll(successes);
  }
  return total;
}

static void drawCell(int32_t *drawn, const int32_t *n, u64 stream) {
  for (int l = 0; l < LANES; l += V) {
    int32_t all = 0;
    for (int i = 0; i < V; i++) all |= n[l + i];
    if (all == 0) { memset(drawn + l, 0, 4 * V); continue; }
    if (all > 63) {
      for (int i = 0; i < V; i++) drawn[l + i] = binomial(n[l + i], rates[l + i], words[0][l + i], words[1][l + i], stream);
      continue;
    }
    u64v trials;
    for (int i = 0; i < V; i++) trials[i] = masks[n[l + i]];
    u64v found = bits(trials, *(f64v *)(rates + l), finaliseV(*(u64v *)(words[0] + l) + stream), finaliseV(*(u64v *)(words[1] + l) + stream));
    for (int i = 0; i < V; i++) drawn[l + i] = __builtin_popcountll(found[i]);
  }
}

static const double tails[] = {0.08106146679532726, 0.04134069595540929, 0.02767792568499834, 0.02079067210376509, 0.01664469118982119,
                               0.01387612882307075, 0.01189670994589177, 0.01041126526197209, 0.00925546218271273, 0.00833056343336287};
static double stirlingTail(double k) {
  if (k < 10) return tails[(int)k];
  double r = 1 / (k + 1), rr = r * r;
  return (1 / 12.0 - (1 / 360.0 - (1 / 1260.0 - rr / 1680.0) * rr) * rr) * r;
}
static double poisson(double mean, u64 w0, u64 w1, u64 stream) {
  if (mean <= 0) return 0;
  u64 a = finalise(w0 + stream), b = finalise(w1 + stream), t;
  if (mean < 30) {
    double u = unit(firstWord(a, b)), chance = exp(-mean), k = 0;
    while (u >= chance && k < 200) u -= chance, k++, chance *= mean / k;
    return k;
  }
  double y = 0.931 + 2.53 * sqrt(mean), x = -0.059 + 0.02483 * y, height = 1.1239 + 1.1328 / (y - 3.4), squeeze = 0.9277 - 3.6224 / (y - 2);
  for (;;) {
    double v = unit(firstWord(a, b));
    t = a ^ b, a = rotl(a, 49) ^ t ^ (t << 21), b = rotl(t, 28);
    double u = unit(firstWord(a, b)) - 0.5;
    t = a ^ b, a = rotl(a, 49) ^ t ^ (t << 21), b = rotl(t, 28);
    double us = 0.5 - fabs(u), k = floor(((2 * x) / us + y) * u + mean + 0.43);
    if (us >= 0.07 && v <= squeeze) return k;
    if (!(k >= 0) || (us < 0.013 && v > us)) continue;
    double chance = k * log(mean / (k + 1)) + (k + 1 - mean) - 0.5 * log(k + 1) - 0.9189385332046728 - stirlingTail(k);
    if (log((v * height) / (x / (us * us) + y)) <= chance) return k;
  }
}

static void poissonLanes(double *means, u64 stream) {
  for (int l = 0; l < LANES; l += V) {
    f64v mean = *(f64v *)(means + l);
    if (!any((u64v)(mean > 0))) continue;
    if (any((u64v)(mean >= 30))) {
      for (int i = l; i < l + V; i++) means[i] = poisson(means[i], words[0][i], words[1][i], stream);
      continue;
    }
    u64v a = finaliseV(*(u64v *)(words[0] + l) + stream), b = finaliseV(*(u64v *)(words[1] + l) + stream), sum = a + b;
    u64v w = (((sum << 17) | (sum >> 47)) + a) >> 11;
    f64v u = __builtin_convertvector((i64v)w, f64v) * 1.1102230246251565e-16, chance = expV(-mean), k = mean * 0;
    for (double index = 1; index <= 200; index++) {
      i64v going = u >= chance;
      if (!any((u64v)going)) break;
      u = (f64v)(((u64v)(u - chance) & (u64v)going) | ((u64v)(mean * 0 - 1) & ~(u64v)going));
      k += (f64v)((u64v)(mean * 0 + 1) & (u64v)going);
      chance *= mean / index;
    }
    *(f64v *)(means + l) = k;
  }
}

static void crowd(const int32_t *record) {
  const double *weights = section(record[3]), *coefficients = section(record[5]);
  for (int patch = 0; patch < patches; patch++) {
    double sum[LANES] = {0}, *target = SLOT(record[7], patch);
    for (int c = 0; c < classes; c++)
      for (int l = 0; l < LANES; l++) sum[l] += weights[c] * CELL(animals, patch, c)[l];
    for (int l = 0; l < LANES; l++) target[l] = 1 / (1 + coefficients[patch] * sum[l]);
  }
}

static void survive(const int32_t *record, const int32_t *patchKeys, const int32_t *classKeys) {
  const double *table = section(record[3]);
  for (int patch = 0; patch < patches; patch++) {
    philox(patchKeys[patch], record[1]);
    for (int c = 0; c < classes; c++) {
      scaledRates(table[patch * classes + c], section(record[4]), c, patch);
      drawCell(CELL(animals, patch, c), CELL(animals, patch, c), streamOf(classKeys[c], 1));
    }
  }
}

static double *moved;

static void disperse(const int32_t *record, const int32_t *patchKeys, const int32_t *classKeys) {
  const int32_t *moves = section(record[3]), *movement = section(record[5]);
  const double *leaving = section(record[4]);
  const int32_t *ways = section(movement[0]), *ends = section(movement[1]), *starts = section(movement[4]), *both = section(movement[5] + 1);
  const double *onward = section(movement[3]), *keep = section(movement[5]);
  memset(arrivals, 0, 4ul * patches * classes * LANES);
  for (int patch = 0; patch < patches; patch++) {
    philox(patchKeys[patch], record[1]);
    int first = starts[patch], width = starts[patch + 1] - first;
    for (int c = 0; c < classes; c++) {
      if (!moves[c]) continue;
      int32_t *cell = CELL(animals, patch, c);
      scaledRates(leaving[patch * classes + c], section(record[7]), c, patch);
      drawCell(counts, cell, streamOf(classKeys[c], 7));
      u64 travel = streamOf(classKeys[c], 8), spreading = streamOf(classKeys[c], 9);
      for (int l = 0; l < LANES; l++) cell[l] -= counts[l];
      for (int l = 0; l < LANES; l++) {
        int n = counts[l];
        if (n > 5 * width) {
          for (int way = ways[patch]; way < ways[patch + 1] && n > 0; way++) {
            u64 own = spreading + (u64)(uint32_t)patchKeys[ends[way]] * 0x9e3779b97f4a7c15u;
            int k = binomial(n, onward[way], words[0][l], words[1][l], own);
            CELL(arrivals, ends[way], c)[l] += k, moved[way] += k, n -= k;
          }
          continue;
        }
        u64 a = finalise(words[0][l] + travel), b = finalise(words[1][l] + travel);
        for (int i = 0; i < n; i++) {
          double position = unit(firstWord(a, b)) * width;
          int column = (int)position, other = position - column >= keep[first + column];
          int way = both[2 * (first + column) + other];
          if (way >= 0) CELL(arrivals, ends[way], c)[l]++, moved[way]++;
          u64 t = a ^ b;
          a = rotl(a, 49) ^ t ^ (t << 21), b = rotl(t, 28);
        }
      }
    }
  }
  for (int i = 0; i < patches * classes * LANES; i++) animals[i] += arrivals[i];
}

static void age(const int32_t *record) {
  const int32_t *next = section(record[4]);
  for (int patch = 0; patch < patches; patch++) {
    memset(arrivals, 0, 4ul * classes * LANES);
    for (int c = 0; c < classes; c++)
      if (next[c] >= 0)
        for (int l = 0; l < LANES; l++) arrivals[next[c] * LANES + l] += CELL(animals, patch, c)[l];
    memcpy(CELL(animals, patch, 0), arrivals, 4ul * classes * LANES);
  }
}

static void breed(const int32_t *record, const int32_t *patchKeys, const int32_t *classKeys) {
  const double *births = section(record[3]);
  for (int patch = 0; patch < patches; patch++) {
    philox(patchKeys[patch], record[1]);
    double young[LANES] = {0};
    for (int c = 0; c < classes; c++) {
      double rate = births[patch * classes + c];
      if (rate == 0) continue;
      for (int l = 0; l < LANES; l++) rates[l] = rate * CELL(animals, patch, c)[l];
      poissonLanes(rates, streamOf(classKeys[c], 2));
      for (int l = 0; l < LANES; l++) young[l] += rates[l];
    }
    for (int l = 0; l < LANES; l++) CELL(animals, patch, 0)[l] += (int32_t)young[l];
  }
}

static double *observed;
static void count(void) {
  for (int l = 0; l < LANES; l++) observed[l] = 0;
  for (int patch = 0; patch < patches; patch++) {
    double *column = observed + (patch + 1) * LANES;
    for (int l = 0; l < LANES; l++) column[l] = 0;
    for (int c = 0; c < classes; c++)
      for (int l = 0; l < LANES; l++) column[l] += CELL(animals, patch, c)[l];
    for (int l = 0; l < LANES; l++) observed[l] += column[l];
  }
}

static void run(int row) {
  const int32_t *patchKeys = section(word(11)), *classKeys = section(word(12));
  const int32_t *record = section(row), *end = record + entries(row);
  for (; record < end; record += 16) switch (record[0]) {
      case 1: breed(record, patchKeys, classKeys); break;
      case 2: survive(record, patchKeys, classKeys); break;
      case 3: age(record); break;
      case 5: disperse(record, patchKeys, classKeys); break;
      case 7: crowd(record); break;
      case 32: vary(record); break;
      case 96: count(); break;
      default: fprintf(stderr, "no opcode %d here\n", record[0]), exit(1);
    }
}

int main(int argc, char **argv) {
  if (argc < 4) return 2;
  openImage(argv[1], argv[3]);
  for (int n = 1; n <= 64; n++) masks[n] = (masks[n - 1] << 1) | 1;
  size_t cells = (size_t)patches * classes * LANES;
  animals = room(4 * cells), arrivals = room(4 * cells);
  observed = room(8ul * (patches + 1) * LANES), moved = room(8ul * word(15));
  const int32_t *start = section(word(13));
  clock_t began = clock();
  for (int first = 0; first < atoi(argv[2]); first += LANES) {
    for (int l = 0; l < LANES; l++) replicates[l] = first + l;
    for (size_t i = 0; i < cells; i++) animals[i] = start[i / LANES];
    for (step = 1; step <= years; step++) run(word(9)), run(word(10));
    for (int l = 0; l < LANES && first + l < atoi(argv[2]); l++) printf("%.0f\n", observed[l]);
  }
  printf("seconds %.6f\n", (double)(clock() - began) / CLOCKS_PER_SEC);
  return 0;
}
