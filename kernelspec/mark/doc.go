// Package mark draws the mark of Adjoin: the lattice of a field with two
// subfields, and a root in the middle of it. The drawing is integer
// arithmetic, so that it has the same bytes on every machine.
package mark
