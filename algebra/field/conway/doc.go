// Package conway has Conway polynomials: the table, and the search that made
// it from the definition.
//
// The Conway polynomial C_{p,n} (R. Parker; C. Jansen, K. Lux, R. Parker,
// R. Wilson, An Atlas of Brauer Characters, 1995) is the monic polynomial of
// degree n over F_p that
//
//   - is primitive: a root generates the multiplicative group of F_{p^n};
//   - is compatible with those of lower degree: for each m | n the power
//     a^((p^n-1)/(p^m-1)) of a root a is a root of C_{p,m};
//   - comes first among those when x^n - a_1 x^(n-1) + a_2 x^(n-2) - ... is
//     written as the word a_1, a_2, ..., a_n with 0 <= a_i < p, and words are
//     compared from the left.
//
// The table, table.txt, has one line "p n c_0 c_1 ... c_(n-1)" for each
// polynomial, and these ranges of degrees n; every divisor of a degree in it
// is in it too:
//
//	p = 2       n <= 48
//	p = 3       n <= 30
//	p = 5       n <= 20
//	p = 7       n <= 16
//	p <= 31     n <= 12
//	p < 1000    n <= 7
//
// To make it anew takes about ten minutes:
//
//	go test -run TestWrite -write
//
// What is not here: fields. Package field asks Lookup.
package conway
