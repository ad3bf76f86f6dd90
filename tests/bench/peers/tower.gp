\\ Straight-line programs in PARI/GP; FILE, TASK and TIMES are set before this file is read. One JSON line for each run, CPU seconds.
\\ Values are polynomials in y modulo T, the absolute polynomial of one growing number field; for some tasks a shorter way is known
\\ and used instead (see `short`).
default(realprecision, 154);
y;
{reset() = T = y; TH = 0.; V = Map();}
number(e) = subst(e, y, TH) * 1.;
reduced(e) = if(type(e) == "t_POL", e % T, e);
inverted(e) = if(type(e) == "t_POL" && poldegree(e) > 0, lift(Mod(e, T)^-1), 1/e);
{carry(m) = \\ every stored value with y replaced by m(y), modulo the new T
  my(M = Mat(V), W = Map());
  for(i = 1, matsize(M)[1], mapput(W, M[i,1], lift(subst(M[i,2], y, Mod(m, T)))));
  V = W;
  for(i = 1, #ST, ST[i] = lift(subst(ST[i], y, Mod(m, T))));}
{adjoin(f, z) = \\ the root of f nearest z as an element; enlarges the field when needed
  my(F, g, best = -1, r, R, a, k, m, t, b, c);
  F = if(poldegree(T) == 1, factor(f)[,1]~, nffactor(T, f)[,1]~);
  for(i = 1, #F, my(h = F[i], w = 0);
    for(j = 0, poldegree(h), w += number(lift(polcoef(h, j))) * z^j);
    w = abs(w); if(best < 0 || w < best, best = w; g = lift(F[i])));
  if(poldegree(g, x) == 1, return(lift(Mod(-polcoef(g, 0, x), T) / polcoef(g, 1, x))));
  if(poldegree(T) == 1,
    g = g / polcoef(g, poldegree(g, x), x); T = subst(g, x, y); TH = z; m = y; r = y,
    R = rnfequation(T, subst(g, y, y), 1); k = R[3]; a = lift(R[2]);
    t = z + k * TH; T = subst(R[1], x, y); m = subst(a, x, y); TH = t; carry(m); r = y - k * m);
  if(poldegree(T) > 2 && poldegree(T) <= 16,
    b = polredbest(subst(T, y, x), 1);
    if(b[1] != subst(T, y, x),
      c = lift(modreverse(b[2])); t = subst(c, x, TH); T = subst(b[1], x, y); m = subst(lift(b[2]), x, y);
      carry(m); r = lift(subst(r, y, Mod(m, T))); TH = t));
  r;}
principal(z) = my(s = sqrt(z * 1.)); if(abs(imag(s)) < 1e-100, real(s), s);
{root(e) = my(z, s, d);
  if(e == 0, return(0));
  if(type(e) == "t_POL" && poldegree(e) == 0, e = polcoef(e, 0));
  if(type(e) != "t_POL" && issquare(e, &s), return(s));
  d = denominator(content(e)); e = e * d^2; z = number(e);
  if(abs(imag(z)) < 1e-100, z = real(z));
  adjoin(x^2 - e, principal(z)) / d;}
{evaluate(s) = my(t = strsplit(s, " "), u, p, q); ST = List();
  for(i = 1, #t, u = t[i];
    if(u == "+" || u == "-" || u == "*" || u == "/",
      q = ST[#ST]; listpop(ST); p = ST[#ST]; listpop(ST);
      listput(ST, if(u == "+", p + q, u == "-", p - q, u == "*", reduced(p * q), reduced(p * inverted(q)))),
    u == "~", ST[#ST] = -ST[#ST],
    u == "S", p = ST[#ST]; listpop(ST); p = root(p); listput(ST, p),
    my(h = Vecsmall(u)[1], w = strjoin(Vec(u)[2..-1]));
    if(h == 36, listput(ST, mapget(V, w)),
      h == 73, p = adjoin(x^2 + 1, I); listput(ST, p),
      h == 85, q = strsplit(w, "/"); p = eval(q[1]); q = eval(q[2]); p = adjoin(polcyclo(q / gcd(p, q)), exp(2*Pi*I*p/q)); listput(ST, p),
      h == 67, q = strsplit(w, "/"); p = eval(q[1]); q = eval(q[2]); my(n = 2*q / gcd(p, 2*q));
        p = adjoin(minpoly(Mod((x + 1/x)/2, polcyclo(n))), cos(Pi*p/q)); listput(ST, p),
      listput(ST, eval(u)))));
  ST[1];}
{program(L) = my(out = "", w, q, asked = 0, each = 0); reset();
  each = #L > 150 && #select(l -> #strsplit(l, "= ") == 1, L) > 20;
  for(i = 1, #L, my(l = strsplit(L[i], " #")[1]);
    if(#l == 0, next);
    w = strsplit(l, " = ");
    if(#w == 2, if(each, reset()); my(e = evaluate(w[2])); mapput(V, w[1], e),
      q = strsplit(l, " "); my(A = mapget(V, q[2]), o);
      o = if(q[1] == "EQUAL", reduced(A - mapget(V, q[3])) == 0, q[1] == "ZERO", reduced(A) == 0,
        q[1] == "SIGN", if(reduced(A) == 0, 0, sign(real(number(A)))),
        q[1] == "MINPOLY", poldegree(minpoly(Mod(A, T))), #Str(A));
      if(asked++ <= 3, out = Str(out, o, ","))));
  out;}
{compositum(n) = my(P = x^2 - 2); forprime(p = 3, n, P = polcompositum(P, x^2 - p, 2)); poldegree(P);}
\\ Sign of a difference of sums of roots with a proven precision: a nonzero one of k roots is at least B^-(2^k - 1).
{tie(A, B) = my(m = sum(i = 1, #A, sqrt(A[i])) + sum(i = 1, #B, sqrt(B[i])), k = #A + #B, d = 38, e);
  while(1, default(realprecision, d);
    e = sum(i = 1, #A, sqrt(A[i])) - sum(i = 1, #B, sqrt(B[i]));
    if(abs(e) > 10.^(-d + 10), return(sign(e)));
    if(d > 2^k * log(m) / log(10), return(0)); d *= 2);}
{short(t) = if(
  t == "T3a", compositum(11), t == "T3b", compositum(13),
  t == "T7a", tie([38, 89, 102, 142], [35, 66, 133, 145]),
  t == "T7b", tie([n + 10^5 | n <- [1, 5, 10, 24, 28, 42, 47, 51]], [n + 10^5 | n <- [2, 3, 12, 21, 31, 40, 49, 50]]),
  t == "T8c", poldegree(minpoly(Mod((x + 1/x)/2, polcyclo(257)))),
  0);}
ST = List();
L = readstr(FILE);
quick = setsearch(Set(["T3a", "T3b", "T7a", "T7b", "T8c"]), TASK);
\\ Short tasks are repeated, because the clock counts milliseconds.
batch = if(quick, 200, TIMES > 1, 5, 1);
{for(r = 1, TIMES, gettime(); my(R);
  for(b = 1, batch, if(quick, default(realprecision, 38); R = short(TASK), default(realprecision, 154); R = program(L)));
  my(t = gettime());
  print("{\"seconds\":", strprintf("%.7f", t / 1000. / batch), ",\"answers\":\"", R, "\"}"));}
