// The baseline in C for runs with weather and whole animals: the same algorithm as the kernel, on the same image, with the same
// streams of random numbers, so that its counts must be the kernel's own. Written for whatever vectors the compiler may use.
//   animals IMAGE REPLICATES SEED > sums      prints one line a replicate: its animals at the end; then the seconds of CPU time
#include <immintrin.h>
#include <math.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

#if defined(__AVX512F__) && defined(__AVX512DQ__)
#define V 8
#elif defined(__AVX2__)
#define V 4
#else
#define V 2
#endif
#define LANES 16
typedef uint64_t u64;
typedef uint64_t u64v __attribute__((vector_size(8 * V), may_alias));
typedef int64_t i64v __attribute__((vector_size(8 * V), may_alias));
typedef double f64v __attribute__((vector_size(8 * V), may_alias));

static char *image;
static int patches, classes, years;
static int32_t word(int at) { return ((int32_t *)image)[at]; }
static int32_t directory(int row, int at) { return ((int32_t *)(image + 256 + row * 32))[at]; }
static void *section(int row) { return row < 0 ? NULL : image + directory(row, 4); }
static int entries(int row) { return directory(row, 3); }

static int32_t *animals, *arrivals;
static double *slots, *weather, *work;
static u64 words[2][LANES] __attribute__((aligned(64)));
static double rates[LANES] __attribute__((aligned(64)));
static int32_t counts[LANES] __attribute__((aligned(64)));
static uint32_t replicates[LANES], keyLow, keyHigh;
static int step;
#define CELL(state, patch, c) ((state) + ((patch) * classes + (c)) * LANES)
#define SLOT(slot, patch) (slots + ((slot) * patches + (patch)) * LANES)

static inline u64 finalise(u64 x) {
  x = (x ^ (x >> 30)) * 0xbf58476d1ce4e5b9u;
  x = (x ^ (x >> 27)) * 0x94d049bb133111ebu;
  return x ^ (x >> 31);
}
static inline u64v finaliseV(u64v x) {
  x = (x ^ (x >> 30)) * 0xbf58476d1ce4e5b9u;
  x = (x ^ (x >> 27)) * 0x94d049bb133111ebu;
  return x ^ (x >> 31);
}
static u64 streamOf(uint32_t key, int use) { return finalise(((u64)key << 32) | (u64)use); }
static inline u64 rotl(u64 x, int k) { return (x << k) | (x >> (64 - k)); }
static inline u64 firstWord(u64 a, u64 b) { return rotl(a + b, 17) + a; }
static inline double unit(u64 w) { return (double)(w >> 11) * 1.1102230246251565e-16; }

static void philox(uint32_t patchKey, uint32_t phaseKey) {
  uint32_t c0[LANES], c1[LANES], c2[LANES], c3[LANES], k0 = keyLow, k1 = keyHigh;
  for (int l = 0; l < LANES; l++) c0[l] = replicates[l], c1[l] = step, c2[l] = patchKey, c3[l] = phaseKey;
  for (int round = 0; round < 10; round++, k0 += 0x9e3779b9u, k1 += 0xbb67ae85u)
    for (int l = 0; l < LANES; l++) {
      u64 p0 = (u64)0xd2511f53u * c0[l], p1 = (u64)0xcd9e8d57u * c2[l];
      uint32_t n0 = (uint32_t)(p1 >> 32) ^ c1[l] ^ k0, n2 = (uint32_t)(p0 >> 32) ^ c3[l] ^ k1;
      c1[l] = (uint32_t)p1, c3[l] = (uint32_t)p0, c0[l] = n0, c2[l] = n2;
    }
  for (int l = 0; l < LANES; l++) words[0][l] = c0[l] | ((u64)c1[l] << 32), words[1][l] = c2[l] | ((u64)c3[l] << 32);
}

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

static void scaledRates(double rate, const int32_t *lists, int c, int patch) {
  for (int l = 0; l < LANES; l++) rates[l] = rate;
  if (!lists) return;
  for (int k = lists[c]; k < lists[c + 1]; k++) {
    const double *values = SLOT(lists[classes + 1 + k], patch);
    for (int l = 0; l < LANES; l++) rates[l] *= values[l];
  }
}

static double expTable[128][2];
static void fillExp(void) {
  for (int k = 0; k < 128; k++) {
    long double exact = exp2l(k / 128.0L);
    union { double d; u64 u; } near = {(double)exact};
    expTable[k][0] = (double)(exact / near.d - 1);
    near.u -= (u64)k << 45;
    expTable[k][1] = near.d;
  }
}
/** The steps of the kernel's own exponential, for numbers of ordinary size. */
static inline f64v expV(f64v x) {
  f64v shifted = x * (0x1.71547652b82fep0 * 128) + 0x1.8p52, whole = shifted - 0x1.8p52;
  f64v r = x + whole * -0x1.62e42fefa0000p-8 + whole * -0x1.cf79abc9e3b3ap-47, tail;
  u64v scale;
  for (int i = 0; i < V; i++) {
    int k = ((u64v)shifted)[i] & 127;
    tail[i] = expTable[k][0];
    scale[i] = *(u64 *)&expTable[k][1];
  }
  scale += (u64v)shifted << 45;
  f64v r2 = r * r, s = (f64v)scale;
  f64v rest = tail + r + r2 * (0x1.ffffffffffdbdp-2 + r * 0x1.555555555543cp-3) + r2 * r2 * (0x1.55555cf172b91p-5 + r * 0x1.1111167a4d017p-7);
  return s + s * rest;
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

#define EIGHT(a, b, c, d, e, f, g, h, r) (((((((((a) * r + b) * r + c) * r + d) * r + e) * r + f) * r + g) * r + h))
static double normalOf(u64 w) {
  u64 k = w >> 11;
  double q = ((double)((int64_t)k - 4503599627370496) + 0.5) * 0x1p-53;
  if (fabs(q) <= 0.425) {
    double r = 0.180625 - q * q;
    return q * (EIGHT(2.5090809287301226727e3, 3.3430575583588128105e4, 6.7265770927008700853e4, 4.5921953931549871457e4, 1.3731693765509461125e4,
                      1.9715909503065514427e3, 1.3314166789178437745e2, 3.387132872796366608, r) /
                EIGHT(5.226495278852854561e3, 2.8729085735721942674e4, 3.930789580009271061e4, 2.1213794301586595867e4, 5.3941960214247511077e3,
                      6.871870074920579083e2, 4.2313330701600911252e1, 1.0, r));
  }
  u64 rare = q < 0 ? k : 9007199254740991 - k;
  double r = sqrt(-log(((double)rare + 0.5) * 0x1p-53)), z;
  if (r <= 5) {
    r -= 1.6;
    z = EIGHT(7.7454501427834140764e-4, 2.27238449892691845833e-2, 2.4178072517745061177e-1, 1.27045825245236838258, 3.64784832476320460504,
              5.7694972214606914055, 4.6303378461565452959, 1.42343711074968357734, r) /
        EIGHT(1.05075007164441684324e-9, 5.475938084995344946e-4, 1.51986665636164571966e-2, 1.4810397642748007459e-1, 6.8976733498510000455e-1,
              1.6763848301838038494, 2.05319162663775882187, 1.0, r);
  } else {
    r -= 5;
    z = EIGHT(2.01033439929228813265e-7, 2.71155556874348757815e-5, 1.2426609473880784386e-3, 2.6532189526576123093e-2, 2.9656057182850489123e-1,
              1.7848265399172913358, 5.4637849111641143699, 6.6579046435011037772, r) /
        EIGHT(2.04426310338993978564e-15, 1.4215117583164458887e-7, 1.8463183175100546818e-5, 7.868691311456132591e-4, 1.48753612908506148525e-2,
              1.3692988092273580531e-1, 5.9983220655588793769e-1, 1.0, r);
  }
  return q < 0 ? -z : z;
}

static void mix(double *target, int factor, int row, const double *from) {
  const int32_t *starts = section(factor), *columns = section(factor + 1);
  const double *weights = section(factor + 2);
  double sum[LANES] = {0};
  for (int e = starts[row]; e < starts[row + 1]; e++)
    for (int l = 0; l < LANES; l++) sum[l] += weights[e] * from[columns[e] * LANES + l];
  memcpy(target, sum, sizeof sum);
}

/** One column of rates, logit-normal numbers, all quantities with the same normals. */
static void vary(const int32_t *record) {
  const int32_t *columnKeys = section(record[3]), *rateKeys = section(record[5]), *quantities = section(record[8]);
  int columns = entries(record[3]), count = entries(record[8]) / 2;
  u64 stream = streamOf(rateKeys[0], 32);
  if (entries(record[5]) != 1) fprintf(stderr, "more than one column of rates\n"), exit(1);
  for (int column = 0; column < columns; column++) {
    philox(columnKeys[column], record[1]);
    for (int l = 0; l < LANES; l++) weather[column * LANES + l] = normalOf(firstWord(finalise(words[0][l] + stream), finalise(words[1][l] + stream)));
    mix(work + column * LANES, record[6], 0, weather + column * LANES);
  }
  for (int patch = 0; patch < patches; patch++) {
    double z[LANES] __attribute__((aligned(64)));
    mix(z, record[4], patch, work);
    for (int k = 0; k < count; k++) {
      const double *d = (double *)section(quantities[2 * k + 1]) + patch * 4;
      double *target = SLOT(quantities[2 * k], patch);
      for (int l = 0; l < LANES; l += V) *(f64v *)(target + l) = d[3] / (1 + expV(-d[1] - d[2] * *(f64v *)(z + l)));
    }
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

static void *room(size_t bytes) { return memset(aligned_alloc(64, (bytes + 63) / 64 * 64), 0, bytes); }

int main(int argc, char **argv) {
  if (argc < 4) return 2;
  FILE *file = fopen(argv[1], "rb");
  fseek(file, 0, SEEK_END);
  long size = ftell(file);
  rewind(file);
  image = room(size);
  if (fread(image, 1, size, file) != (size_t)size) return 1;
  patches = word(4), classes = word(5), years = word(6), keyLow = atoi(argv[3]);
  for (int n = 1; n <= 64; n++) masks[n] = (masks[n - 1] << 1) | 1;
  fillExp();
  size_t cells = (size_t)patches * classes * LANES;
  animals = room(4 * cells), arrivals = room(4 * cells), slots = room(8ul * word(7) * patches * LANES);
  weather = room(8ul * (word(16) + 1) * LANES), work = room(8ul * (word(17) + 1) * LANES);
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
