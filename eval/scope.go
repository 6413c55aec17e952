package eval

import "adjoin/eval/value"

// scope is a chain of bindings, the innermost first. It ends in the names that
// the session had when the cell began. Scopes are never changed, so a function
// keeps the one it was written in.
type scope struct {
	name string
	v    value.Value
	up   *scope
	base *snapshot // of the outermost scope
}

func (s *scope) bind(name string, v value.Value) *scope {
	return &scope{name: name, v: v, up: s}
}

func (s *scope) find(name string) (value.Value, bool) {
	for ; s.up != nil; s = s.up {
		if s.name == name {
			return s.v, true
		}
	}
	v, ok := s.base.names[name]
	return v, ok
}

// flatten collects the bindings of a cell on top of those it began with.
func (s *scope) flatten() map[string]value.Value {
	var chain []*scope
	for ; s.up != nil; s = s.up {
		chain = append(chain, s)
	}
	names := make(map[string]value.Value, len(s.base.names)+len(chain))
	for n, v := range s.base.names {
		names[n] = v
	}
	for i := len(chain) - 1; i >= 0; i-- {
		names[chain[i].name] = chain[i].v
	}
	return names
}
