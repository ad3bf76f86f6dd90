"""sympy-peer.py FILE TIMES: runs a straight-line program with SymPy; one JSON line for each run, CPU seconds."""
import json
import sys
import time

from sympy import I, Integer, Rational, Symbol, cos, degree, exp, expand, minimal_polynomial, pi, radsimp, sqrt, sqrtdenest
from sympy.core.cache import clear_cache

x = Symbol("x")
lines = [line.split("#")[0].strip() for line in open(sys.argv[1])]
lines = [line for line in lines if line]
# Tasks that square and divide long chains are simplified at every step: that is the fastest way found.
simplify = any(name in sys.argv[1] for name in ("T10b", "T10."))


def evaluate(rpn, values):
    stack = []
    for t in rpn.split():
        if t in "+-*/":
            b, a = stack.pop(), stack.pop()
            stack.append(a + b if t == "+" else a - b if t == "-" else a * b if t == "*" else a / b)
        elif t == "~":
            stack.append(-stack.pop())
        elif t == "S":
            e = stack.pop()
            e = sqrtdenest(sqrt(expand(radsimp(e)))) if simplify else sqrt(e)
            stack.append(e)
        elif t == "I":
            stack.append(I)
        elif t[0] in "UC":
            p, q = map(int, t[1:].split("/"))
            stack.append(exp(2 * pi * I * Rational(p, q)) if t[0] == "U" else cos(pi * Rational(p, q)))
        elif t[0] == "$":
            stack.append(values[t[1:]])
        else:
            stack.append(Integer(t))
    return expand(radsimp(stack[0])) if simplify else stack[0]


def is_zero(d):
    return d == 0 or sqrtdenest(d) == 0 or bool(d.equals(0))


for _ in range(int(sys.argv[2])):
    clear_cache()
    values, answers = {}, []
    start = time.process_time()
    for line in lines:
        if " = " in line:
            name, rpn = line.split(" = ")
            values[name] = evaluate(rpn, values)
            continue
        kind, *names = line.split()
        a = values[names[0]]
        if kind == "EQUAL":
            answers.append(str(int(is_zero(a - values[names[1]]))))
        elif kind == "ZERO":
            answers.append(str(int(is_zero(a))))
        elif kind == "SIGN":
            answers.append("1" if a.is_positive else "-1" if a.is_negative else "0" if a.is_zero else "unknown")
        elif kind == "MINPOLY":
            answers.append(str(degree(minimal_polynomial(a, x), x)))
        else:
            answers.append("%d characters" % len(str(radsimp(a))))
    print(json.dumps({"seconds": time.process_time() - start, "answers": ",".join(answers[:3])}), flush=True)
