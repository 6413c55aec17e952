package eval

import (
	"sort"

	"adjoin/algebra/field"
	"adjoin/eval/value"
)

// snapshot is what the cells so far have bound. It is never changed.
type snapshot struct {
	names  map[string]value.Value
	fields []namedField // the shortest names first
}

type namedField struct {
	name string
	K    *field.Field
}

func newSnapshot(names map[string]value.Value) *snapshot {
	s := &snapshot{names: names}
	for name, v := range names {
		if f, ok := value.Plain(v).(value.Field); ok {
			s.fields = append(s.fields, namedField{name, f.K})
		}
	}
	sort.Slice(s.fields, func(i, j int) bool {
		a, b := s.fields[i].name, s.fields[j].name
		return len(a) < len(b) || len(a) == len(b) && a < b
	})
	return s
}

// printer prints values with the names that fields have at this moment. A
// field whose definition is as short as a name, such as F_256, keeps it.
func (c *cell) printer() *value.Printer {
	return &value.Printer{FieldName: func(K *field.Field) (string, bool) {
		if K.IsPrime() || K.IsStandard() && K.Name() == "" {
			return "", false
		}
		s := c.scope
		for ; s.up != nil; s = s.up {
			if c.means(s.name, K) {
				return s.name, true
			}
		}
		for _, f := range s.base.fields {
			if c.means(f.name, K) {
				return f.name, true
			}
		}
		return "", false
	}}
}

// means says whether a name is bound to K under the name of its generator.
func (c *cell) means(name string, K *field.Field) bool {
	v, ok := c.scope.find(name)
	f, isField := value.Plain(v).(value.Field)
	return ok && isField && f.K.Name() == K.Name() && field.Same(f.K, K)
}
