package vocabulary

import (
	"fmt"
	"strings"

	"adjoin/algebra"
	"adjoin/eval/display"
)

// Explain is the entry for the given words, every entry when several words
// meanings share them, or without words the whole reference.
func Explain(words []string) (display.Bundle, error) {
	if len(words) == 0 {
		return page(Reference()), nil
	}
	text := strings.Join(words, " ")
	found := About(text)
	if len(found) == 0 {
		e := algebra.Errorf(algebra.Invalid, "%s is not in the vocabulary", text)
		var all []string
		for class := Noun; class <= Notation; class++ {
			all = append(all, Words(class)...)
		}
		if near := Near(text, all); len(near) > 0 {
			return display.Bundle{}, e.WithRemedy("did you mean %s?", strings.Join(near, ", or "))
		}
		return display.Bundle{}, e.WithRemedy("explain without words shows the whole reference")
	}
	parts := make([]string, len(found))
	for i, e := range found {
		parts[i] = e.Text()
	}
	return page(strings.Join(parts, "\n\n")), nil
}

// About lists the entries of all classes for the given words.
func About(words string) []*Entry {
	var found []*Entry
	for class := Noun; class <= Notation; class++ {
		if e := index[class][words]; e != nil {
			found = append(found, e)
		}
	}
	return found
}

func page(text string) display.Bundle { return display.Text{Text: text}.Bundle() }

// Text is the entry as plain text.
func (e *Entry) Text() string {
	var b strings.Builder
	fmt.Fprintf(&b, "%s (%s)\n", e.Words, e.Class)
	for _, s := range e.Signatures() {
		fmt.Fprintf(&b, "    %s\n", s)
	}
	fmt.Fprintf(&b, "%s%s.\n", strings.ToUpper(e.Meaning[:1]), e.Meaning[1:])
	if len(e.Also) > 0 {
		fmt.Fprintf(&b, "Also written: %s.\n", strings.Join(e.Also, ", "))
	}
	for _, x := range e.Examples {
		fmt.Fprintf(&b, "    %s\n        %s\n", x.Code, x.Result)
	}
	if e.Source != "" {
		fmt.Fprintf(&b, "Source: %s.\n", e.Source)
	}
	return strings.TrimRight(b.String(), "\n")
}

// Reference is the whole vocabulary as plain text, topic by topic in the order
// in which the topics first appear.
func Reference() string {
	var order []string
	byTopic := map[string][]*Entry{}
	for _, e := range entries {
		if byTopic[e.Topic] == nil {
			order = append(order, e.Topic)
		}
		byTopic[e.Topic] = append(byTopic[e.Topic], e)
	}
	var b strings.Builder
	for _, topic := range order {
		fmt.Fprintf(&b, "%s\n%s\n\n", strings.ToUpper(topic), strings.Repeat("=", len(topic)))
		for _, e := range byTopic[topic] {
			b.WriteString(e.Text())
			b.WriteString("\n\n")
		}
	}
	return strings.TrimRight(b.String(), "\n")
}
