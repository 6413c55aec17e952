// Package rep has the representations of finite fields: it makes fields into
// the poly.Arith that the algorithms of algebra/poly work on, and chooses
// among the ways to do so.
//
//	F_2                        packed bits
//	F_p, p < 2^63              one word an element
//	F_p, longer p              Montgomery residues of several words
//	F_{2^n} over F_2           packed residues; tables of logarithms when small
//	other orders to 4096       Zech's logarithms
//	anything else              residues of polynomials over the base, whatever
//	                           that is, so towers of any height
//
// A representation is described by about ten kernels on vectors of elements
// (vectors, in vectors.go); dense.go builds all of poly.Arith on them. Packed
// bits implement poly.Arith directly.
//
// Where to start reading: Prime in prime.go and Extend in extension.go.
package rep
