// Package ratpoly has polynomials in one variable over the integers and the
// rationals: exact, immutable values. Number fields and Galois groups over Q
// are not here.
//
// Where to start reading: poly.go; gcd.go for the modular methods; factor.go
// for the factorization.
package ratpoly
