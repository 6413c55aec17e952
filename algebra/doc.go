// Package algebra is the vocabulary that every package below it shares: the
// kinds of error, the workspace of one computation, and the evidence that
// comes with an answer. It holds no mathematics of its own.
//
// Where to start reading: algebra/field is what a user of the library means by
// a finite field; algebra/poly has every polynomial algorithm once, over any
// coefficients; algebra/rep decides how coefficients lie in memory; and
// algebra/integer has primes and factorisations.
//
// # Interrupts and budgets
//
// Long loops call Work.Poll. When the Stop behind the workspace has been
// pulled, Poll unwinds the computation with a panic that only Catch
// recognises; the one place that owns the computation defers Catch and gets an
// ordinary *Error of kind Interrupted or TooLarge. A nil *Stop never stops.
package algebra
