package field

import "adjoin/algebra/rep"

// Fresh is F_p with no memory of standard fields, to make them in another
// order.
func Fresh(F *Field) *Field {
	K := &Field{structure: &structure{p: F.p, n: 1, absolute: 1, standard: true, standing: F.standing}}
	K.prime, K.arith, K.lattice = K, rep.Prime(F.p), newLattice()
	return K
}

// StandardOver is the standard field of degree n that F remembers or makes.
var StandardOver = standardField

// StandardMap is the embedding by the rule of standard.go.
var StandardMap = standardMap
