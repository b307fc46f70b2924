/* SuiteSparse on a network file: edge list in, all voltages out. Prints one JSON line with the times in ms.
   peer cholmod|klu FILE REPEATS [VOLTS]: CHOLMOD for one conductor (real), KLU for either. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <sys/resource.h>
#include <time.h>
#include <suitesparse/cholmod.h>
#include <suitesparse/klu.h>
#include <suitesparse/umfpack.h>

typedef struct {
  int block, buses, runs, n;
  int *from, *to;
  double *g;               /* one conductor: siemens of each run */
  double *yRe, *yIm;       /* four: 10 values a run */
  double *bRe, *bIm, *shunt;
} Net;

static double now(void) {
  struct timespec t;
  clock_gettime(CLOCK_MONOTONIC, &t);
  return t.tv_sec * 1e3 + t.tv_nsec * 1e-6;
}

static int ascending(const void *a, const void *b) {
  double x = *(const double *)a, y = *(const double *)b;
  return (x > y) - (x < y);
}

static void *take(FILE *f, size_t size, size_t count) {
  void *p = malloc(size * count + 1);
  if (!p || fread(p, size, count, f) != count) { fprintf(stderr, "short file\n"); exit(1); }
  return p;
}

static Net readNet(const char *path) {
  Net net = {0};
  FILE *f = fopen(path, "rb");
  if (!f) { perror(path); exit(1); }
  int *head = take(f, 4, 4);
  net.block = head[0]; net.buses = head[1]; net.runs = head[2]; net.n = net.block * net.buses;
  net.from = take(f, 4, net.runs);
  net.to = take(f, 4, net.runs);
  if (net.block == 1) {
    net.g = take(f, 8, net.runs);
    net.bRe = take(f, 8, net.n);
  } else {
    net.yRe = take(f, 8, 10l * net.runs);
    net.yIm = take(f, 8, 10l * net.runs);
    net.bRe = take(f, 8, net.n);
    net.bIm = take(f, 8, net.n);
    net.shunt = take(f, 8, net.n);
  }
  fclose(f);
  return net;
}

static void byCholmod(const Net *net, double *x) {
  cholmod_common c;
  cholmod_start(&c);
  c.nmethods = 1; c.method[0].ordering = CHOLMOD_AMD; c.postorder = 1; c.print = 0;
  int n = net->n;
  cholmod_triplet *t = cholmod_allocate_triplet(n, n, (size_t)net->runs + n, 1, CHOLMOD_REAL, &c);
  int *ti = t->i, *tj = t->j;
  double *tx = t->x, *diagonal = calloc(n, 8);
  long k = 0;
  for (int e = 0; e < net->runs; e++) {
    int a = net->from[e], b = net->to[e];
    double g = net->g[e];
    if (a < n) diagonal[a] += g;
    if (b < n) diagonal[b] += g;
    if (a < n && b < n) { ti[k] = a < b ? a : b; tj[k] = a < b ? b : a; tx[k++] = -g; }
  }
  for (int i = 0; i < n; i++) { ti[k] = tj[k] = i; tx[k++] = diagonal[i]; }
  t->nnz = k;
  free(diagonal);
  cholmod_sparse *A = cholmod_triplet_to_sparse(t, 0, &c);
  cholmod_free_triplet(&t, &c);
  cholmod_factor *L = cholmod_analyze(A, &c);
  cholmod_factorize(A, L, &c);
  cholmod_dense *b = cholmod_allocate_dense(n, 1, n, CHOLMOD_REAL, &c);
  memcpy(b->x, net->bRe, 8l * n);
  cholmod_dense *v = cholmod_solve(CHOLMOD_A, L, b, &c);
  memcpy(x, v->x, 8l * n);
  cholmod_free_dense(&b, &c); cholmod_free_dense(&v, &c);
  cholmod_free_factor(&L, &c); cholmod_free_sparse(&A, &c); cholmod_finish(&c);
}

static long fillReal(const Net *net, int *ti, int *tj, double *tx) {
  long k = 0;
  for (int e = 0; e < net->runs; e++) {
    int end[2] = {net->from[e], net->to[e]};
    for (int p = 0; p < 2; p++)
      for (int q = 0; q < 2; q++)
        if (end[p] < net->n && end[q] < net->n) {
          ti[k] = end[p]; tj[k] = end[q]; tx[k++] = p == q ? net->g[e] : -net->g[e];
        }
  }
  return k;
}

static long fillFour(const Net *net, int *ti, int *tj, double *tx, double *tz) {
  long k = 0;
  for (int e = 0; e < net->runs; e++) {
    int end[2] = {net->from[e], net->to[e]};
    for (int p = 0; p < 2; p++)
      for (int q = 0; q < 2; q++) {
        if (end[p] >= net->buses || end[q] >= net->buses) continue;
        double sign = p == q ? 1 : -1;
        for (int i = 0; i < 4; i++)
          for (int j = 0; j < 4; j++) {
            int a = i < j ? i : j, b = i < j ? j : i;
            long at = 10l * e + a * 4 - a * (a - 1) / 2 + (b - a);
            ti[k] = end[p] * 4 + i; tj[k] = end[q] * 4 + j;
            tx[k] = sign * net->yRe[at]; tz[k++] = sign * net->yIm[at];
          }
      }
  }
  for (int i = 0; i < net->n; i++)
    if (net->shunt[i] != 0) { ti[k] = tj[k] = i; tx[k] = net->shunt[i]; tz[k++] = 0; }
  return k;
}

/* x: n values, or 2n interleaved where complex. UMFPACK serves only to sum the triplets into columns. */
static void byKlu(const Net *net, double *x) {
  int n = net->n, four = net->block == 4;
  long most = four ? 64l * net->runs + n : 4l * net->runs;
  int *ti = malloc(4 * most), *tj = malloc(4 * most);
  double *tx = malloc(8 * most), *tz = four ? malloc(8 * most) : 0;
  long nz = four ? fillFour(net, ti, tj, tx, tz) : fillReal(net, ti, tj, tx);
  int *Ap = malloc(4l * (n + 1)), *Ai = malloc(4 * nz);
  double *Ax = malloc(8 * nz), *Az = four ? malloc(8 * nz) : 0, *Axz = Ax;
  if (four) umfpack_zi_triplet_to_col(n, n, nz, ti, tj, tx, tz, Ap, Ai, Ax, Az, 0);
  else umfpack_di_triplet_to_col(n, n, nz, ti, tj, tx, Ap, Ai, Ax, 0);
  free(ti); free(tj); free(tx); free(tz);
  if (four) {
    Axz = malloc(16l * Ap[n]);
    for (long i = 0; i < Ap[n]; i++) { Axz[2 * i] = Ax[i]; Axz[2 * i + 1] = Az[i]; }
  }
  klu_common c;
  klu_defaults(&c);
  klu_symbolic *S = klu_analyze(n, Ap, Ai, &c);
  klu_numeric *N = four ? klu_z_factor(Ap, Ai, Axz, S, &c) : klu_factor(Ap, Ai, Ax, S, &c);
  if (!N) { fprintf(stderr, "klu status %d\n", c.status); exit(1); }
  if (four) {
    for (int i = 0; i < n; i++) { x[2 * i] = net->bRe[i]; x[2 * i + 1] = net->bIm[i]; }
    klu_z_solve(S, N, n, 1, x, &c);
    klu_z_free_numeric(&N, &c);
    free(Axz);
  } else {
    memcpy(x, net->bRe, 8l * n);
    klu_solve(S, N, n, 1, x, &c);
    klu_free_numeric(&N, &c);
  }
  klu_free_symbolic(&S, &c);
  free(Ap); free(Ai); free(Ax); free(Az);
}

int main(int argc, char **argv) {
  if (argc < 4) { fprintf(stderr, "usage: peer cholmod|klu FILE REPEATS [VOLTS]\n"); return 64; }
  Net net = readNet(argv[2]);
  int repeats = atoi(argv[3]);
  double *took = malloc(8l * repeats), *x = malloc(16l * net.n);
  for (int k = 0; k < repeats; k++) {
    double began = now();
    if (!strcmp(argv[1], "cholmod")) byCholmod(&net, x); else byKlu(&net, x);
    took[k] = now() - began;
  }
  if (argc > 4) {
    FILE *f = fopen(argv[4], "wb");
    fwrite(x, 8, (size_t)net.n * (net.block == 4 ? 2 : 1), f);
    fclose(f);
  }
  qsort(took, repeats, 8, ascending);
  struct rusage used;
  getrusage(RUSAGE_SELF, &used);
  printf("{\"median\":%.6f,\"low\":%.6f,\"high\":%.6f,\"peakMB\":%.1f}\n", took[repeats / 2],
         took[repeats / 10], took[repeats - 1 - repeats / 10], used.ru_maxrss / 1024.0);
  return 0;
}
