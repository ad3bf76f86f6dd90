/* ca FILE TIMES: runs a straight-line program with the ca_t of libcalcium, a fresh context each time; one JSON line for each run. */
#include <calcium/ca.h>
static ca_ctx_t ctx;
#define VALUE ca_t
#define NEW(x) ca_init(x, ctx)
#define CLEAR(x) ca_clear(x, ctx)
#define SET(x, y) ca_set(x, y, ctx)
#define INT(x, z) ca_set_fmpz(x, z, ctx)
#define ROOT_OF_UNITY(x, p, q) (ca_pi_i(x, ctx), ca_mul_si(x, x, 2 * (p), ctx), ca_div_si(x, x, q, ctx), ca_exp(x, x, ctx))
#define COS_PI(x, p, q) (ca_pi(x, ctx), ca_mul_si(x, x, p, ctx), ca_div_si(x, x, q, ctx), ca_cos(x, x, ctx))
#define ADD(x, y) ca_add(x, x, y, ctx)
#define SUB(x, y) ca_sub(x, x, y, ctx)
#define MUL(x, y) ca_mul(x, x, y, ctx)
#define DIV(x, y) ca_div(x, x, y, ctx)
#define NEG(x) ca_neg(x, x, ctx)
#define SQRT(x) ca_sqrt(x, x, ctx)
#define IMAGINARY(x) ca_i(x, ctx)
#include <calcium/qqbar.h>
#include "straight-line.h"

static void begin(void) {
  ca_ctx_init(ctx);
  /* The default degree limit of 120 leaves 2cos(2π/17) − roots of unity undecided. */
  ca_ctx_set_option(ctx, CA_OPT_QQBAR_DEG_LIMIT, 400);
}
static void end(void) { ca_ctx_clear(ctx); }

static void truth(truth_t t, char *out) { sprintf(out, t == T_TRUE ? "1" : t == T_FALSE ? "0" : "unknown"); }

static void query(const char *kind, const char *a, const char *b, char *out) {
  if (!strcmp(kind, "EQUAL")) truth(ca_check_equal(find(a)->v, find(b)->v, ctx), out);
  else if (!strcmp(kind, "ZERO")) truth(ca_check_is_zero(find(a)->v, ctx), out);
  else if (!strcmp(kind, "SIGN")) {
    ca_t zero;
    ca_init(zero, ctx);
    truth_t above = ca_check_gt(find(a)->v, zero, ctx);
    truth_t below = above == T_TRUE ? T_FALSE : ca_check_lt(find(a)->v, zero, ctx);
    sprintf(out, above == T_TRUE ? "1" : below == T_TRUE ? "-1" : above == T_FALSE && below == T_FALSE ? "0" : "unknown");
    ca_clear(zero, ctx);
  } else if (!strcmp(kind, "MINPOLY")) {
    qqbar_t z;
    qqbar_init(z);
    if (ca_get_qqbar(z, find(a)->v, ctx)) sprintf(out, "%ld", (long)qqbar_degree(z));
    else sprintf(out, "refused");
    qqbar_clear(z);
  } else {
    char *s = ca_get_str(find(a)->v, ctx);
    sprintf(out, "%zu characters", strlen(s));
    flint_free(s);
  }
}
