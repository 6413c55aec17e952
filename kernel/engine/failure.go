package engine

import (
	"strings"

	"adjoin/eval"
	"adjoin/kernel"
)

// ANSI codes, which belong into tracebacks and nowhere else.
const (
	red   = "\x1b[31m"
	bold  = "\x1b[1m"
	plain = "\x1b[0m"
)

// failure is the error as a notebook shows it: the block that the session
// writes, its first line red and the caret bold.
func failure(e *eval.Error) *kernel.Failure {
	if e == nil {
		return nil
	}
	lines := strings.Split(e.Text(), "\n")
	lines[0] = red + lines[0] + plain
	for i, l := range lines[1:] {
		if blanks, ok := strings.CutSuffix(l, "^"); ok && strings.TrimSpace(blanks) == "" {
			lines[1+i] = blanks + bold + "^" + plain
		}
	}
	return &kernel.Failure{Name: e.Name, Reason: e.Error(), Traceback: lines}
}
