package eval

import (
	"strings"

	"adjoin/eval/vocabulary"
	"adjoin/lang"
)

// nouns are the nouns of one word, which may be called like functions.
var nouns = vocabulary.SingleNouns()

func (c *cell) unknownName(name string) error {
	near := vocabulary.Near(name, c.known())
	remedy := "a name is bound with let; a single lower-case letter may stay unbound and is then an indeterminate"
	if len(near) > 0 {
		remedy = "did you mean " + strings.Join(near, ", or ") + "?"
	}
	return &told{nameUnknown, name + " is not bound", remedy}
}

// known lists the names and words that a name could have been meant as.
func (c *cell) known() []string {
	var words []string
	for n := range c.scope.flatten() {
		words = append(words, n)
	}
	return append(words, vocabulary.Names()...)
}

func (c *cell) unknownPhrase(words string, s lang.Span) error {
	return unknown(s, "the phrase "+words+" of ... is not known", words, vocabulary.Noun, "explain lists the vocabulary")
}

func (c *cell) unknownPredicate(words string, s lang.Span) error {
	return unknown(s, "the property "+words+" is not known", words, vocabulary.Predicate, "explain lists the vocabulary")
}

func (c *cell) unknownForm(words string, s lang.Span) error {
	return unknown(s, "the form as "+words+" is not known", words, vocabulary.Form, "there are as table, as LaTeX and others; explain lists them")
}

func unknown(s lang.Span, reason, words string, class vocabulary.Class, otherwise string) error {
	remedy := otherwise
	if near := vocabulary.Near(words, vocabulary.Words(class)); len(near) > 0 {
		remedy = "did you mean " + strings.Join(near, ", or ") + "?"
	}
	return &fault{at: s, name: nameUnknown, reason: reason, remedy: remedy}
}
