package main

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"os"
	"strings"
	"unicode/utf8"

	"golang.org/x/term"

	"adjoin/eval"
	"adjoin/kernel"
	"adjoin/kernel/engine"
	"adjoin/lang"
)

const (
	prompt = "> "
	onward = "  " // before the further lines of a statement
)

// converse is a session on a terminal, line by line.
func converse(s *eval.Session, out *printer) error {
	fmt.Fprintf(out.out, "Adjoin %s. explain lists the vocabulary; Ctrl-D ends the session.\n", engine.Version)
	history := kernel.NewHistory(kernel.DefaultHistory())
	lines := &pastLines{}
	for _, input := range history.Inputs() {
		if !strings.Contains(input, "\n") {
			lines.keep(input)
		}
	}
	for count := 1; ; {
		text, err := readStatement(s, lines)
		switch {
		case errors.Is(err, io.EOF):
			return nil
		case err != nil:
			return err
		case strings.TrimSpace(text) == "":
			continue
		}
		if err := out.evaluate(s, text); err != nil && !errors.Is(err, failed{}) {
			fmt.Fprintln(out.err, err)
		}
		lines.keep(strings.ReplaceAll(text, "\n", " "))
		history.Add(count, text, "")
		history.Flush()
		count++
	}
}

// readStatement reads lines until they make a whole statement.
func readStatement(s *eval.Session, lines *pastLines) (string, error) {
	fd := int(os.Stdin.Fd())
	old, err := term.MakeRaw(fd)
	if err != nil {
		return "", err
	}
	defer func() { _ = term.Restore(fd, old) }()
	keys := &keyboard{in: os.Stdin}
	t := term.NewTerminal(struct {
		io.Reader
		io.Writer
	}{keys, os.Stdout}, prompt)
	t.History = lines
	if w, h, err := term.GetSize(fd); err == nil && w > 0 {
		_ = t.SetSize(w, h)
	}
	text := ""
	t.AutoCompleteCallback = func(line string, pos int, key rune) (string, int, bool) {
		if key != '\t' {
			return "", 0, false
		}
		return complete(s, t, text, line, pos)
	}
	for {
		line, err := t.ReadLine()
		if err != nil && !errors.Is(err, term.ErrPasteIndicator) {
			return "", err
		}
		if keys.abandoned {
			return "", nil
		}
		text += line
		c := s.IsComplete(text)
		if c.Status != lang.Incomplete || strings.TrimSpace(line) == "" && text != "" {
			return text, nil
		}
		text += "\n"
		t.SetPrompt(onward + c.Indent)
	}
}

// keyboard turns Ctrl-C, which would end the session, into what a terminal's
// user means by it: the statement is abandoned and its line is emptied.
type keyboard struct {
	in        io.Reader
	waiting   []byte
	abandoned bool
}

const (
	ctrlC     = 3
	emptyLine = "\x05\x15\r" // to the end, cut to the start, enter
)

func (k *keyboard) Read(p []byte) (int, error) {
	if len(k.waiting) == 0 {
		n, err := k.in.Read(p)
		if err != nil || bytes.IndexByte(p[:n], ctrlC) < 0 {
			return n, err
		}
		k.abandoned = true
		k.waiting = []byte(emptyLine)
	}
	n := copy(p, k.waiting)
	k.waiting = k.waiting[n:]
	return n, nil
}

// complete completes the word before the cursor as far as there is only one
// way, and lists the ways where there are several.
func complete(s *eval.Session, t *term.Terminal, before, line string, pos int) (string, int, bool) {
	c := s.Complete(before+line, len(before)+pos)
	from, to := c.From-len(before), c.To-len(before)
	if len(c.Items) == 0 || from < 0 || to > len(line) || from > to {
		return line, pos, true
	}
	common := c.Items[0].Text
	for _, i := range c.Items[1:] {
		common = commonPrefix(common, i.Text)
	}
	if len(common) <= to-from && len(c.Items) > 1 {
		var words []string
		for _, i := range c.Items {
			words = append(words, i.Text)
		}
		fmt.Fprintln(t, strings.Join(words, "   "))
		return line, pos, true
	}
	return line[:from] + common + line[to:], from + len(common), true
}

func commonPrefix(a, b string) string {
	n := 0
	for n < len(a) && n < len(b) && a[n] == b[n] {
		n++
	}
	for n > 0 && n < len(a) && !utf8.RuneStart(a[n]) {
		n--
	}
	return a[:n]
}

// pastLines are the statements that the arrow keys recall, each on one line.
type pastLines struct{ lines []string }

func (p *pastLines) keep(line string) {
	if strings.TrimSpace(line) != "" && (len(p.lines) == 0 || p.lines[len(p.lines)-1] != line) {
		p.lines = append(p.lines, line)
	}
}

// Add implements term.History, which offers each line; a statement of several
// lines is kept as one.
func (p *pastLines) Add(string) {}

// Len implements term.History.
func (p *pastLines) Len() int { return len(p.lines) }

// At implements term.History: 0 is the latest line.
func (p *pastLines) At(i int) string { return p.lines[len(p.lines)-1-i] }
