// Package engine is the Engine of package kernel that stands before sessions of
// package eval. It translates, and does nothing else.
package engine
