// Package demos holds notebooks that a user would write, with their outputs,
// and the tests of the house as a whole: that the demos still give the outputs
// they hold, that imports point down, that every package says what it is.
//
// The settings of the notebooks are invented.
package demos
