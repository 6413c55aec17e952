// Package funcfield has the field F_q(t) of rational functions over a finite
// field: exact reduced fractions, the Frobenius endomorphism and why it is not
// onto, and p-th roots where there are any. Extensions of F_q(t) are not here.
//
// Where to start reading: fraction.go for the arithmetic, frobenius.go for what
// is particular to characteristic p.
package funcfield
