// Package integer has what fields need of the integers: primality, factoring,
// above all of p^n - 1, divisors and orders. It does no arithmetic on its own
// beyond math/big.
//
// Where to start reading: prime.go, factor.go, and power.go for p^n - 1.
package integer
