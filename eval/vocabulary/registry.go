package vocabulary

import (
	"sort"
	"strings"

	"adjoin/eval/value"
	"adjoin/lang"
)

// topics are the parts of the reference, in its order.
var topics = [][]Entry{
	notation,
	numbers,
	fields,
	elements,
	polynomials,
	bases,
	maps,
	groups,
	functions,
	literals,
	collections,
	forms,
}

// The registry, filled once from the topics.
var (
	entries []*Entry
	index   = map[Class]map[string]*Entry{}
	lexicon *lang.Lexicon

	// Constants are the names that have a value from the start.
	Constants = map[string]value.Value{}
)

func init() {
	for _, topic := range topics {
		for i := range topic {
			e := &topic[i]
			entries = append(entries, e)
			if index[e.Class] == nil {
				index[e.Class] = map[string]*Entry{}
			}
			for _, w := range append([]string{e.Words}, e.Also...) {
				if index[e.Class][w] != nil {
					panic("vocabulary: two entries for the " + e.Class.String() + " " + w)
				}
				index[e.Class][w] = e
			}
			if e.Class == Constant {
				Constants[e.Words] = e.Value
			}
		}
	}
	lexicon = newLexicon()
}

// All lists the entries in the order of the reference. They must not be
// changed.
func All() []*Entry { return entries }

// Lookup finds a word of the given class, or nil.
func Lookup(class Class, words string) *Entry { return index[class][words] }

// Hidden is the constant, or the noun of one word, that a binding of the name
// would hide, or nil.
func Hidden(name string) *Entry {
	if e := index[Constant][name]; e != nil {
		return e
	}
	return index[Noun][name]
}

// Words lists the words of one class, spellings included, in alphabetical
// order. Predicates come with the verbs.
func Words(class Class) []string {
	var list []string
	for w := range index[class] {
		list = append(list, w)
	}
	if class == Predicate {
		for w := range index[Verb] {
			list = append(list, w)
		}
	}
	sort.Strings(list)
	return list
}

// Names lists the words that may stand where a name stands: constants, and
// nouns of one word.
func Names() []string {
	list := Words(Constant)
	for w := range SingleNouns() {
		list = append(list, w)
	}
	sort.Strings(list)
	return list
}

// SingleNouns are the nouns of one word, which may be called like functions.
func SingleNouns() map[string]bool {
	m := map[string]bool{}
	for w := range index[Noun] {
		if !strings.Contains(w, " ") {
			m[w] = true
		}
	}
	return m
}

// Lexicon is what the parser has to know of the vocabulary.
func Lexicon() *lang.Lexicon { return lexicon }

func newLexicon() *lang.Lexicon {
	l := &lang.Lexicon{
		Heads: []string{"F", "g", "zeta"}, Applied: []string{"sqrt"},
		Nouns: Words(Noun), Verbs: Words(Verb), Forms: Words(Form), Roles: map[string][]string{},
	}
	for w := range index[Predicate] {
		l.Predicates = append(l.Predicates, w)
	}
	sort.Strings(l.Predicates)
	seen := map[[2]string]bool{}
	for _, e := range entries {
		for _, k := range e.Cases {
			for _, a := range k.Args {
				if key := [2]string{a.Prep, a.Role}; a.Role != "" && !seen[key] {
					seen[key] = true
					l.Roles[a.Prep] = append(l.Roles[a.Prep], a.Role)
				}
			}
		}
	}
	return l
}
