"""Answers questions about finite fields and integers by FLINT.

One JSON object a line in, one a line out. A field is {"p": prime, "modulus":
[coefficients] or null}; an element is the number sum c_i p^i of its
coordinates; a polynomial is the list of its coefficients, constant term first.
Numbers are decimal strings.
"""

import json
import sys

import flint

contexts = {}


def field(p, modulus):
    key = (p, tuple(modulus or ()))
    if key not in contexts:
        if modulus:
            ring = flint.fmpz_mod_poly_ctx(flint.fmpz_mod_ctx(flint.fmpz(p)))
            k = flint.fq_default_ctx(modulus=ring([int(c) for c in modulus]))
        else:
            k = flint.fq_default_ctx(int(p), 1)
        contexts[key] = k, flint.fq_default_poly_ctx(k)
    return contexts[key]


def element(k, p, code):
    code, digits = int(code), []
    while code:
        code, d = divmod(code, int(p))
        digits.append(d)
    return k(digits)


def code(p, a):
    n = 0
    for c in reversed(a.to_list()):
        n = n * int(p) + int(c)
    return str(n)


def answer(q):
    op = q["op"]
    if op == "factor integer":
        return [[str(p), e] for p, e in flint.fmpz(int(q["n"])).factor()]
    if op == "prime":
        return bool(flint.fmpz(int(q["n"])).is_prime())
    if op == "cyclotomic":
        return [str(c) for c in flint.fmpz_poly.cyclotomic(q["n"]).coeffs()]
    if op == "conway":
        m = flint.fq_default_ctx(int(q["p"]), q["n"]).modulus()
        return [str(c) for c in m.coeffs()]
    if op.startswith("integer "):
        f = flint.fmpz_poly([int(c) for c in q["f"]])
        if op == "integer factor":
            unit, factors = f.factor()
            return {"unit": str(unit), "factors": [[[str(c) for c in g.coeffs()], e] for g, e in factors]}
        if op == "integer discriminant":
            return str(f.discriminant())
        g = flint.fmpz_poly([int(c) for c in q["g"]])
        if op == "integer product":
            return [str(c) for c in (f * g).coeffs()]
        if op == "integer gcd":
            return [str(c) for c in f.gcd(g).coeffs()]
        if op == "integer resultant":
            return str(f.resultant(g))
    p = q["p"]
    k, ring = field(p, q["modulus"])
    if op == "is order":
        a, n = element(k, p, q["a"]), int(q["n"])
        return a**n == 1 and all(a ** (n // int(r)) != 1 for r, _ in flint.fmpz(n).factor())
    if op == "element":
        a, b = element(k, p, q["a"]), element(k, p, q["b"])
        inverse = code(p, a.inverse()) if a != 0 else None
        return {
            "product": code(p, a * b),
            "inverse": inverse,
            "trace": str(int(a.trace())),
            "norm": str(int(a.norm())),
            "power": code(p, a ** int(q["e"])),
            "frobenius": code(p, a.frobenius(q["k"])),
            "square": a.is_square(),
        }
    poly = lambda cs: ring([element(k, p, c) for c in cs])
    codes = lambda f: [code(p, c) for c in f.coeffs()]
    f = poly(q["f"])
    if op == "derivative":
        return codes(f.derivative())
    if op == "irreducible":
        return f.is_irreducible()
    if op == "roots":
        return [[code(p, a), e] for a, e in f.roots()]
    if op == "factor":
        lead, factors = f.factor()
        return {"lead": code(p, lead), "factors": [[codes(g), e] for g, e in factors]}
    g = poly(q["g"])
    if op == "product":
        return codes(f * g)
    if op == "gcd":
        return codes(f.gcd(g))
    if op == "divide":
        quotient, remainder = divmod(f, g)
        return [codes(quotient), codes(remainder)]
    if op == "xgcd":
        return [codes(h) for h in f.xgcd(g)]
    if op == "compose":
        return codes(f.compose(g))
    if op == "compose modulo":
        return codes(f.compose_mod(g, poly(q["m"])))
    if op == "power":
        return codes(f.pow_mod(int(q["e"]), g))
    raise ValueError(op)


for line in sys.stdin:
    print(json.dumps(answer(json.loads(line))), flush=True)
