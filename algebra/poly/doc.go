// Package poly has dense polynomials over a finite field and every generic
// algorithm on them, once. What the coefficients are and how they lie in
// memory is the business of an Arith (see algebra/rep for those that exist);
// nothing here knows.
//
// Conventions. A function that may run long takes the workspace of its
// computation first and polls it. A polynomial passed in is never changed. A
// result is freshly allocated unless a parameter called z receives it, and z
// may be one of the operands. Lists of factors and roots come in the canonical
// order: by degree, then by the codes of the coefficients from the highest
// down. Random choices are seeded by the input, so that equal inputs give
// equal outputs.
//
// Where to start reading: arith.go is the door to the coefficients, basic.go
// the everyday operations, factor.go the factorisation.
package poly
