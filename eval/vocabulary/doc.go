// Package vocabulary is the registry of the words of the language: nouns of
// phrases, predicates, verbs, roles of literals and forms after as. Each word
// is one Entry: its words, its arguments with their kinds, one sentence of
// meaning, examples with their results, and a source. Completion, tooltips,
// the printed reference, the did-you-mean, the parser's lexicon and the
// examples that run as tests all come from here.
//
// Where to start reading: entry.go is what an entry says, kinds.go the kinds of
// arguments, registry.go the list of the topics, elements.go a topic.
//
// # How to add a word
//
// Choose the topic file it belongs to, or make a new one with a variable of its
// own that registry.go lists. Add an entry; the words are what a paper would
// print, without articles and without the prepositions that take arguments:
//
//	{
//		Words: "trace", Class: Noun, Topic: "elements",
//		Meaning: "the sum of the conjugates of an element over K",
//		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 2.22",
//		Cases: []Case{{
//			Args: []Arg{{Prep: "of", Kind: Element}, {Prep: "over", Kind: Field, Optional: true}},
//			Do: func(c *value.Context, a []value.Value) (value.Value, error) {
//				x := a[0].(value.Element) // the Kind says which Go type it is
//				if a[1] == nil {          // an optional argument that was left out
//					...
//				}
//			},
//		}},
//		Examples: []Example{{"trace of g_16^3 over F_2", "1"}},
//	}
//
// Then run the tests of package eval: each example is a session of its own,
// with statements parted by semicolons, whose last value must print as Result.
//
//   - A word with several meanings (the order of an element, of a polynomial, of
//     a map) has one Case for each. The first Case whose prepositions and kinds
//     fit is taken, so their order matters only where kinds overlap.
//   - When over K only says where the question is asked, as for the gcd of two
//     polynomials, set Over in the Case in place of an Arg: the objects are
//     moved to K before Do sees them.
//   - A role is an Arg with Role: {Prep: "from", Role: "mask", Kind: Integer}
//     takes from mask 0x11D.
//   - A yes-or-no word has Class Predicate (X is prime) or Verb (X embeds in Y)
//     and returns a value.Verdict with its evidence. Its first Arg has no Prep
//     and is the subject; so has the object of words that end in a preposition
//     (subfield of).
//   - Errors are *algebra.Error with a reason and, when there is one, a remedy:
//     algebra.Errorf(kind, ...).WithRemedy(...). The evaluator adds the place.
//   - Long loops poll c.W, and sizes are checked with the methods of
//     value.Context before the work starts.
//   - What should show as a table is a value.List with Notes. What can be
//     counted without being listed is a value.Lazy: number of ... then costs
//     nothing.
package vocabulary
