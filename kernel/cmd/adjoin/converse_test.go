package main

import (
	"bytes"
	"context"
	"io"
	"strings"
	"testing"

	"golang.org/x/term"

	"adjoin/eval"
)

func TestCompleteInALine(t *testing.T) {
	s := eval.NewSession(eval.Options{})
	if err := s.Execute(context.Background(), "let Komet = 1\nlet Kobold = 2\nlet αβ = 3", &printer{out: &bytes.Buffer{}, err: &bytes.Buffer{}, mime: "text/plain"}); err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		before, line string // | is the cursor
		want         string
		listed       string
	}{
		{"", "1 + Kom| - 1", "1 + Komet| - 1", ""},
		{"", "1 + K|", "1 + Ko|", ""},
		{"", "1 + Ko|", "1 + Ko|", "Kobold"},
		{"f(\n", "Kom|", "Komet|", ""},
		{"", "2 * α|", "2 * αβ|", ""},
		{"", "qqq|", "qqq|", ""},
	} {
		var screen bytes.Buffer
		terminal := term.NewTerminal(&screen, "")
		pos := strings.Index(c.line, "|")
		line, at, ok := complete(s, terminal, c.before, strings.Replace(c.line, "|", "", 1), pos)
		if got := line[:at] + "|" + line[at:]; !ok || got != c.want || !strings.Contains(screen.String(), c.listed) {
			t.Errorf("%s: %s, listed %q", c.line, got, screen.String())
		}
	}
}

func TestPastLines(t *testing.T) {
	var p pastLines
	for _, line := range []string{"a", "", "b", "b", " "} {
		p.keep(line)
	}
	if p.Len() != 2 || p.At(0) != "b" || p.At(1) != "a" {
		t.Errorf("%v", p.lines)
	}
}

func TestCommonPrefix(t *testing.T) {
	for _, c := range [][3]string{{"abc", "abd", "ab"}, {"", "x", ""}, {"αβ", "αγ", "α"}, {"ab", "abc", "ab"}} {
		if got := commonPrefix(c[0], c[1]); got != c[2] {
			t.Errorf("%s %s: %q", c[0], c[1], got)
		}
	}
}

func TestCtrlCAbandonsTheLine(t *testing.T) {
	keys := &keyboard{in: strings.NewReader("6*7\x03")}
	var screen bytes.Buffer
	terminal := term.NewTerminal(struct {
		io.Reader
		io.Writer
	}{keys, &screen}, "")
	line, err := terminal.ReadLine()
	if line != "" || err != nil || !keys.abandoned {
		t.Errorf("%q %v, abandoned: %v", line, err, keys.abandoned)
	}
	keys = &keyboard{in: strings.NewReader("6*7\r")}
	terminal = term.NewTerminal(struct {
		io.Reader
		io.Writer
	}{keys, &screen}, "")
	if line, err := terminal.ReadLine(); line != "6*7" || err != nil || keys.abandoned {
		t.Errorf("%q %v, abandoned: %v", line, err, keys.abandoned)
	}
}
