// Package vocabulary is the registry of the words of the language: nouns of
// phrases, predicates, verbs, roles of literals and forms after as. Each word
// is one Entry: its words, its arguments with their kinds, one sentence of
// meaning, examples with their results, and a source. Completion, tooltips,
// the printed reference, the did-you-mean and the examples that run as tests
// all come from here.
//
// # How to add a word
//
//  1. Choose the topic file it belongs to (numbers.go, fields.go, elements.go,
//     polynomials.go, ...), or make a new one, declare in it a
//
//     var bases = []Entry{ ... }
//
//     and add that variable to the list in registry.go.
//
//  2. Write the Entry. Words are what a paper would print, without articles
//     and without the prepositions that take arguments:
//
//     {
//     Words: "trace", Class: Noun, Topic: "elements",
//     Meaning: "the sum of the conjugates of an element over a subfield",
//     Source:  "Lidl and Niederreiter, Finite Fields, 1997, section 2.3",
//     Cases: []Case{{
//     Args: []Arg{{Prep: "of", Kind: Element}, {Prep: "over", Kind: Field, Optional: true}},
//     Do: func(c *value.Context, a []value.Value) (value.Value, error) {
//     x := a[0].(value.Element) // the Kind says which Go type it is
//     if a[1] == nil { ... }    // an optional argument that was left out
//     },
//     }},
//     Examples: []Example{{"trace of g_16 over F_2", "0"}},
//     }
//
//  3. A word with several meanings (order of an element, of a polynomial, of a
//     map) has one Case for each; the first Case whose arguments fit is taken,
//     so the order of the Cases matters only where kinds overlap.
//
//  4. Return errors as *algebra.Error with a reason and a remedy
//     (algebra.Errorf(...).WithRemedy(...)); the evaluator adds the place.
//     Long loops go through c.Work.Poll, sizes are checked with the methods of
//     value.Context before the work starts.
//
//  5. A yes-or-no word has Class Predicate ("is ..."), or Verb ("embeds in"),
//     and returns a value.Verdict with its evidence. Its first argument has
//     Prep "" and is what stands before the word.
//
//  6. Run the tests of eval: each Example is a cell of its own (several
//     statements may be parted by ;) whose last value must print as Result.
//
// Argument kinds are in kinds.go; a new kind is one more variable there.
package vocabulary
