/* Straight-line programs for the C runners: reading, and the stack machine. The including file defines the value type
   and the macros NEW, CLEAR, SET, INT, ROOT_OF_UNITY, COS_PI, ADD, SUB, MUL, DIV, NEG, SQRT, IMAGINARY. */
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

typedef struct { char name[24]; VALUE v; } Named;
static Named *named;
static int named_count;
static char *lines[20000];
static int line_count;

static double seconds(void) {
  struct timespec t;
  clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &t);
  return t.tv_sec + 1e-9 * t.tv_nsec;
}

static void read_program(const char *path) {
  static char buffer[65536];
  FILE *f = fopen(path, "r");
  while (fgets(buffer, sizeof buffer, f)) {
    char *remark = strchr(buffer, '#');
    if (remark) *remark = 0;
    int n = strlen(buffer);
    while (n && (buffer[n - 1] == '\n' || buffer[n - 1] == ' ')) buffer[--n] = 0;
    if (n) lines[line_count++] = strdup(buffer);
  }
  fclose(f);
}

static Named *find(const char *name) {
  for (int i = named_count - 1; i >= 0; i--) if (!strcmp(named[i].name, name)) return &named[i];
  fprintf(stderr, "no value %s\n", name);
  exit(2);
}

static void run_line(VALUE result, char *rpn) {
  static VALUE stack[64];
  int top = 0;
  char *save;
  for (char *t = strtok_r(rpn, " ", &save); t; t = strtok_r(NULL, " ", &save)) {
    long p, q;
    if (strchr("+-*/", t[0]) && !t[1]) {
      if (t[0] == '+') ADD(stack[top - 2], stack[top - 1]);
      else if (t[0] == '-') SUB(stack[top - 2], stack[top - 1]);
      else if (t[0] == '*') MUL(stack[top - 2], stack[top - 1]);
      else DIV(stack[top - 2], stack[top - 1]);
      CLEAR(stack[--top]);
    } else if (t[0] == '~') NEG(stack[top - 1]);
    else if (t[0] == 'S') SQRT(stack[top - 1]);
    else {
      NEW(stack[top]);
      if (t[0] == 'I') IMAGINARY(stack[top]);
      else if (t[0] == 'U') { sscanf(t + 1, "%ld/%ld", &p, &q); ROOT_OF_UNITY(stack[top], p, q); }
      else if (t[0] == 'C') { sscanf(t + 1, "%ld/%ld", &p, &q); COS_PI(stack[top], p, q); }
      else if (t[0] == '$') SET(stack[top], find(t + 1)->v);
      else {
        fmpz_t z;
        fmpz_init(z);
        fmpz_set_str(z, t, 10);
        INT(stack[top], z);
        fmpz_clear(z);
      }
      top++;
    }
  }
  SET(result, stack[0]);
  CLEAR(stack[0]);
}

/* Answers one query into `out`. */
static void query(const char *kind, const char *a, const char *b, char *out);
static void begin(void);
static void end(void);

int main(int argc, char **argv) {
  if (argc < 3) return 2;
  read_program(argv[1]);
  named = calloc(20000, sizeof(Named));
  for (int r = 0; r < atoi(argv[2]); r++) {
    static char answers[65536];
    answers[0] = 0;
    int asked = 0;
    named_count = 0;
    double start = seconds();
    begin();
    for (int i = 0; i < line_count; i++) {
      char copy[65536];
      strcpy(copy, lines[i]);
      char *eq = strstr(copy, " = ");
      if (eq) {
        *eq = 0;
        NEW(named[named_count].v);
        run_line(named[named_count].v, eq + 3);
        strcpy(named[named_count++].name, copy);
      } else {
        char kind[16], a[24] = "", b[24] = "", out[64] = "";
        sscanf(copy, "%15s %23s %23s", kind, a, b);
        query(kind, a, b, out);
        if (asked++ < 3) { strcat(answers, out); strcat(answers, ","); }
      }
    }
    double stop = seconds();
    printf("{\"seconds\":%.7f,\"answers\":\"%s\"}\n", stop - start, answers);
    fflush(stdout);
    for (int i = 0; i < named_count; i++) CLEAR(named[i].v);
    end();
  }
  return 0;
}
