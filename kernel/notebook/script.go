package notebook

import (
	"context"
	"strings"

	"adjoin/kernel/client"
	"adjoin/kernel/wire"
)

// FromScript makes a notebook of a script: its paragraphs, which blank lines
// part, are the cells. A paragraph of comments alone is text. A blank line
// inside brackets parts nothing; complete, which may be nil, says so.
func FromScript(src string, complete func(code string) bool) *Notebook {
	n := &Notebook{Metadata: map[string]any{}}
	var open string
	for _, p := range paragraphs(src) {
		if open != "" {
			p = open + "\n\n" + p
		}
		if open == "" && isComment(p) {
			n.Cells = append(n.Cells, &Cell{Kind: "markdown", Source: uncomment(p)})
			continue
		}
		if open = p; complete == nil || complete(p) {
			n.Cells = append(n.Cells, &Cell{Kind: "code", Source: p})
			open = ""
		}
	}
	if open != "" {
		n.Cells = append(n.Cells, &Cell{Kind: "code", Source: open})
	}
	return n
}

// CompleteIn asks the kernel whether a text waits for more lines.
func CompleteIn(ctx context.Context, c *client.Client) func(code string) bool {
	return func(code string) bool {
		var a wire.IsCompleteReply
		err := c.Ask(ctx, false, "is_complete_request", wire.IsCompleteRequest{Code: code}, &a)
		return err != nil || a.Status != "incomplete"
	}
}

func paragraphs(src string) []string {
	var all []string
	var p []string
	for line := range strings.Lines(strings.ReplaceAll(src, "\r\n", "\n") + "\n\n") {
		if line = strings.TrimRight(line, " \t\n"); line != "" {
			p = append(p, line)
		} else if len(p) > 0 {
			all = append(all, strings.Join(p, "\n"))
			p = nil
		}
	}
	return all
}

func isComment(p string) bool {
	for line := range strings.Lines(p) {
		if !strings.HasPrefix(line, "#") {
			return false
		}
	}
	return true
}

func uncomment(p string) string {
	var b strings.Builder
	for line := range strings.Lines(p) {
		b.WriteString(strings.TrimPrefix(strings.TrimPrefix(line, "#"), " "))
	}
	return b.String()
}
