// What the baselines in C share: the image as the kernel reads it, its streams of random numbers, and the weather that they make.
// Written for whatever vectors the compiler may use.
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

static double *slots, *weather, *work;
static u64 words[2][LANES] __attribute__((aligned(64)));
static double rates[LANES] __attribute__((aligned(64)));
static uint32_t replicates[LANES], keyLow, keyHigh;
static int step;
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

static void *room(size_t bytes) { return memset(aligned_alloc(64, (bytes + 63) / 64 * 64), 0, bytes); }

static void openImage(const char *path, const char *seed) {
  FILE *file = fopen(path, "rb");
  fseek(file, 0, SEEK_END);
  long size = ftell(file);
  rewind(file);
  image = room(size);
  if (fread(image, 1, size, file) != (size_t)size) exit(1);
  patches = word(4), classes = word(5), years = word(6), keyLow = atoi(seed);
  fillExp();
  slots = room(8ul * word(7) * patches * LANES);
  weather = room(8ul * (word(16) + 1) * LANES), work = room(8ul * (word(17) + 1) * LANES);
}
