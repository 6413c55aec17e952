package notebook

import (
	"context"
	"encoding/json"
	"fmt"

	"adjoin/kernel/client"
	"adjoin/kernel/wire"
)

// Runner runs notebooks in a kernel.
type Runner struct {
	Client    *client.Client
	KeepGoing bool // run the cells after one that fails
	// Progress, when not nil, hears of each code cell that has been run, at
	// number i of n, or skipped after a failure.
	Progress func(i, n int, c *Cell, o Outcome)
}

// Outcome is what became of a cell.
type Outcome int

// A cell ran, failed, failed as it was meant to, or was not run.
const (
	Ran Outcome = iota
	Failed
	FailedAsMeant
	Skipped
)

// Run runs the code cells of n in order and replaces their outputs. Failed
// counts those that failed, without those that are tagged raises-exception.
func (r *Runner) Run(ctx context.Context, n *Notebook) (failed int, err error) {
	if err := r.describe(ctx, n); err != nil {
		return 0, err
	}
	code := n.CodeCells()
	for i, c := range code {
		delete(c.Metadata, "execution") // times of an earlier run
		outcome := Skipped
		c.Outputs, c.Count = nil, 0
		if failed == 0 || r.KeepGoing {
			if outcome, err = r.cell(ctx, c); err != nil {
				return failed, err
			}
		}
		if outcome == Failed {
			failed++
		}
		if r.Progress != nil {
			r.Progress(i+1, len(code), c, outcome)
		}
	}
	return failed, nil
}

func (r *Runner) cell(ctx context.Context, c *Cell) (Outcome, error) {
	p, err := r.Client.Send(false, "execute_request", wire.ExecuteRequest{Code: c.Source})
	if err != nil {
		return Failed, err
	}
	var out collector
	var bad error
	reply, err := p.Wait(ctx, func(a client.Arrival) {
		if err := out.see(a); err != nil {
			bad = err
		}
	})
	if err == nil {
		err = bad
	}
	if err != nil {
		return Failed, err
	}
	var answer struct {
		Status  string      `json:"status"`
		Count   int         `json:"execution_count"`
		Payload []wire.Page `json:"payload"`
	}
	if err := json.Unmarshal(reply.Content, &answer); err != nil {
		return Failed, err
	}
	c.Outputs, c.Count = out.outputs, answer.Count
	switch {
	case answer.Status == wire.StatusOK:
		return Ran, nil
	case c.Tagged("raises-exception"):
		return FailedAsMeant, nil
	}
	return Failed, nil
}

// describe writes into the notebook what kernel and language it is for, as a
// notebook server would.
func (r *Runner) describe(ctx context.Context, n *Notebook) error {
	var info wire.KernelInfoReply
	if err := r.Client.Ask(ctx, false, "kernel_info_request", struct{}{}, &info); err != nil {
		return fmt.Errorf("the kernel does not say what it is: %w", err)
	}
	l := info.LanguageInfo
	if other := n.language(); other != "" && other != l.Name {
		return fmt.Errorf("the notebook is written in %s, and this kernel runs %s", other, l.Name)
	}
	n.Metadata["language_info"] = map[string]any{
		"name": l.Name, "version": l.Version, "mimetype": l.MIMEType, "file_extension": l.FileExtension,
	}
	if _, ok := n.Metadata["kernelspec"]; !ok {
		n.Metadata["kernelspec"] = map[string]any{"name": l.Name, "display_name": "Adjoin", "language": l.Name}
	}
	return nil
}

// language is what the notebook says it is written in, "" when it says nothing.
func (n *Notebook) language() string {
	for _, at := range [][2]string{{"kernelspec", "language"}, {"language_info", "name"}} {
		if s := joined(object(n.Metadata[at[0]])[at[1]]); s != "" {
			return s
		}
	}
	return ""
}
