// Package field has finite fields as their users mean them: immutable values
// with a presentation, elements that know their field, polynomials over them,
// and the maps between them.
//
// # Presentations
//
// A Field is a prime field, or a base field with a root of a monic irreducible
// polynomial adjoined (Adjoin), to any height; or it is the standard
// presentation of its order (Standard). Two fields are the same (Same) when
// they arise from the same polynomials; the letter of the generator does not
// count.
//
// # The standard fields of one characteristic
//
// For each prime p and each n there is one standard field F_{p^n} = F_p(g_n).
// It depends on p and n alone, never on what was made before, and all of them
// fit together: for m | n there is one fixed embedding, and the embeddings of
// a chain compose. The rule that fixes g_n stands in standard.go; in short,
// Conway polynomials in the range of the table (package conway), and beyond it
// towers of prime degree put together as Luebeck does.
//
// # A user's own presentation
//
// K(a), with a a root of f over K, joins the standard fields by one fixed
// embedding: it extends that of K, and sends a to the root of the image of f
// that has the least code. Embed, Common and Preimage follow it both ways.
// So any two fields of one characteristic meet somewhere, and it is always
// known where.
//
// # Order of elements
//
// The elements of a field are numbered (Elem.Code): 0..p-1 for F_p, and
// sum c_i |K|^i for the coordinates c_i over the base K, constant term first.
// Lists of roots, conjugates and polynomials follow this order or say which
// other one.
//
// # Failure
//
// Operations that mathematics may refuse return an error. Sums and products of
// elements of different fields are the caller's mistake and unwind through
// algebra.Fail with an error of kind Mismatch; Combine moves two elements to
// where they meet beforehand.
//
// What is not here: matrices (algebra/linalg), function fields
// (algebra/funcfield), the Galois correspondence (algebra/galois).
//
// Where to start reading: field.go, elem.go, then standard.go and embed.go.
package field
