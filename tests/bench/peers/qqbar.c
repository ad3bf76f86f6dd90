/* qqbar FILE TIMES: runs a straight-line program with the qqbar_t of libcalcium; one JSON line for each run. */
#include <calcium/fexpr.h>
#include <calcium/qqbar.h>
#define VALUE qqbar_t
#define NEW(x) qqbar_init(x)
#define CLEAR(x) qqbar_clear(x)
#define SET(x, y) qqbar_set(x, y)
#define INT(x, z) qqbar_set_fmpz(x, z)
#define ROOT_OF_UNITY(x, p, q) qqbar_root_of_unity(x, p, q)
#define COS_PI(x, p, q) qqbar_cos_pi(x, p, q)
#define ADD(x, y) qqbar_add(x, x, y)
#define SUB(x, y) qqbar_sub(x, x, y)
#define MUL(x, y) qqbar_mul(x, x, y)
#define DIV(x, y) qqbar_div(x, x, y)
#define NEG(x) qqbar_neg(x, x)
#define SQRT(x) qqbar_sqrt(x, x)
#define IMAGINARY(x) qqbar_i(x)
#include "straight-line.h"

static void begin(void) {}
static void end(void) {}

static void query(const char *kind, const char *a, const char *b, char *out) {
  if (!strcmp(kind, "EQUAL")) sprintf(out, "%d", qqbar_equal(find(a)->v, find(b)->v));
  else if (!strcmp(kind, "ZERO")) sprintf(out, "%d", qqbar_is_zero(find(a)->v));
  else if (!strcmp(kind, "SIGN")) sprintf(out, "%d", qqbar_sgn_re(find(a)->v));
  else if (!strcmp(kind, "MINPOLY")) sprintf(out, "%ld", (long)qqbar_degree(find(a)->v));
  else {
    fexpr_t x;
    fexpr_init(x);
    int found = qqbar_get_fexpr_formula(x, find(a)->v, QQBAR_FORMULA_ALL | QQBAR_FORMULA_RADICAL_FORM);
    sprintf(out, found ? "formula" : "no formula");
    fexpr_clear(x);
  }
}
