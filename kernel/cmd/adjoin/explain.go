package main

import (
	"errors"
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"adjoin/algebra"
	"adjoin/eval/vocabulary"
)

func explainCommand() *cobra.Command {
	var asJSON bool
	c := &cobra.Command{
		Use:   "explain [WORDS]",
		Short: "Explain words of the vocabulary, or all of them",
		Example: `  adjoin explain minimal polynomial
  adjoin explain | less
  adjoin explain --json trace`,
		RunE: func(c *cobra.Command, words []string) error {
			b, err := vocabulary.Explain(strings.Fields(strings.Join(words, " ")))
			if err != nil {
				return fault(err)
			}
			if !asJSON {
				_, err = fmt.Fprintln(c.OutOrStdout(), b.Data["text/plain"])
				return err
			}
			entries := vocabulary.All()
			if len(words) > 0 {
				entries = vocabulary.About(strings.Join(strings.Fields(strings.Join(words, " ")), " "))
			}
			return writeJSON(c.OutOrStdout(), described(entries))
		},
	}
	c.Flags().BoolVar(&asJSON, "json", false, "print the entries as JSON")
	return c
}

// fault is an error with the way out that it knows.
func fault(err error) error {
	var e *algebra.Error
	if errors.As(err, &e) && e.Remedy != "" {
		return fmt.Errorf("%w; %s", err, e.Remedy)
	}
	return err
}

// word is an entry of the vocabulary as JSON.
type word struct {
	Words    string    `json:"words"`
	Also     []string  `json:"also,omitempty"`
	Class    string    `json:"class"`
	Topic    string    `json:"topic"`
	Usage    []string  `json:"usage"`
	Meaning  string    `json:"meaning"`
	Examples []example `json:"examples,omitempty"`
	Source   string    `json:"source,omitempty"`
}

type example struct {
	Code   string `json:"code"`
	Result string `json:"result"`
}

func described(entries []*vocabulary.Entry) []word {
	words := []word{}
	for _, e := range entries {
		w := word{e.Words, e.Also, e.Class.String(), e.Topic, e.Signatures(), e.Meaning, nil, e.Source}
		for _, x := range e.Examples {
			w.Examples = append(w.Examples, example(x))
		}
		words = append(words, w)
	}
	return words
}
