package lang

import (
	"sort"
	"strings"

	"github.com/alecthomas/participle/v2"
	"github.com/alecthomas/participle/v2/lexer"
)

// words is a Lexicon made ready for look-up, with the grammar built upon it.
type words struct {
	heads, applied           map[string]bool
	nouns, predicates, verbs entries
	roles                    map[string]entries // by preposition
	grammar                  *participle.Parser[statement]
}

// entries are word sequences by their first token, the longest first.
type entries map[string][]entry

// entry is one sequence: its tokens, and its words as the tree holds them
// ("p-th root" is four tokens and two words).
type entry struct {
	tokens, words []string
}

// index makes the look-up tables on first use. A nil Lexicon is an empty one.
func (lex *Lexicon) index() *words {
	if lex == nil {
		return empty.index()
	}
	lex.once.Do(func() {
		w := &words{
			heads: set(lex.Heads...), applied: set(lex.Applied...),
			nouns: newEntries(lex.Nouns), predicates: newEntries(lex.Predicates), verbs: newEntries(lex.Verbs),
			roles: map[string]entries{},
		}
		for prep, roles := range lex.Roles {
			w.roles[prep] = newEntries(roles)
		}
		w.grammar = newGrammar(w)
		lex.words = w
	})
	return lex.words
}

var empty Lexicon

func newEntries(texts []string) entries {
	m := entries{}
	for _, text := range texts {
		e := entry{words: strings.Fields(text)}
		for s := newScanner(text); ; {
			t := s.next()
			if t.Type == lexer.EOF {
				break
			}
			e.tokens = append(e.tokens, plain(&t))
		}
		if len(e.tokens) > 0 {
			m[e.tokens[0]] = append(m[e.tokens[0]], e)
		}
	}
	for _, list := range m {
		sort.SliceStable(list, func(i, j int) bool { return len(list[i].tokens) > len(list[j].tokens) })
	}
	return m
}

// match is the longest entry that the coming tokens spell, from the k-th on.
func (p *parser) match(m entries, k int) (entry, bool) {
	if t := p.ahead(k); t.Type == tName || t.Type == tKeyword {
		for _, e := range m[plain(t)] {
			if p.spells(e, k) {
				return e, true
			}
		}
	}
	return entry{}, false
}

func (p *parser) spells(e entry, k int) bool {
	for i, text := range e.tokens {
		if t := p.ahead(k + i); t.Type == tStr || plain(t) != text {
			return false
		}
	}
	return true
}
