package main

import (
	"errors"
	"fmt"
	"io"
	"os"

	"github.com/spf13/cobra"
	"golang.org/x/term"

	"adjoin/kernel/engine"
)

// Exit codes.
const (
	exitFailed = 1 // a cell, a check or the like failed
	exitUsage  = 2 // the command line is wrong
)

// failed ends the program with exitFailed; what there is to say has been said.
type failed struct{}

func (failed) Error() string { return "failed" }

// usageError is a wrong command line.
type usageError struct{ error }

func main() { os.Exit(run(os.Args[1:], os.Stdin, os.Stdout, os.Stderr)) }

func run(args []string, stdin io.Reader, stdout, stderr io.Writer) int {
	root := newRoot()
	root.SetArgs(args)
	root.SetIn(stdin)
	root.SetOut(stdout)
	root.SetErr(stderr)
	cmd, err := root.ExecuteC()
	var usage usageError
	switch {
	case err == nil:
		return 0
	case errors.Is(err, failed{}):
		return exitFailed
	case errors.As(err, &usage):
		fmt.Fprintf(stderr, "adjoin: %v\nTry '%s --help'.\n", err, cmd.CommandPath())
		return exitUsage
	}
	fmt.Fprintf(stderr, "adjoin: %v\n", err)
	return exitFailed
}

func newRoot() *cobra.Command {
	root := &cobra.Command{
		Use:           "adjoin",
		Short:         "Field extensions in textbook notation",
		Long:          "Adjoin computes with field extensions, written as textbooks write them:\nin Jupyter notebooks, in scripts, and on the command line.",
		Example:       "  adjoin eval 'minimal polynomial of g_256 over F_4'\n  adjoin run --html notebook.ipynb\n  adjoin install && jupyter lab",
		Version:       engine.Version,
		SilenceErrors: true,
		SilenceUsage:  true,
		Args:          noArgs,
		RunE:          func(c *cobra.Command, _ []string) error { return c.Help() },
	}
	root.SetVersionTemplate("adjoin {{.Version}}\n")
	root.SetFlagErrorFunc(func(_ *cobra.Command, err error) error { return usageError{err} })
	root.CompletionOptions.HiddenDefaultCmd = true
	root.AddCommand(runCommand(), evalCommand(), explainCommand(), installCommand(), uninstallCommand(), doctorCommand(), kernelCommand(), versionCommand())
	return root
}

func noArgs(c *cobra.Command, args []string) error {
	if len(args) > 0 {
		return usageError{fmt.Errorf("unknown command or argument %q", args[0])}
	}
	return nil
}

func someArgs(what string) cobra.PositionalArgs {
	return func(c *cobra.Command, args []string) error {
		if len(args) == 0 {
			return usageError{fmt.Errorf("%s is missing", what)}
		}
		return nil
	}
}

// isTerminal says whether a stream is one.
func isTerminal(stream any) bool {
	f, ok := stream.(*os.File)
	return ok && term.IsTerminal(int(f.Fd()))
}

// coloured says whether w is a terminal on which colours are welcome.
func coloured(w io.Writer) bool {
	return os.Getenv("NO_COLOR") == "" && os.Getenv("TERM") != "dumb" && isTerminal(w)
}

// paint puts text into an ANSI colour where colours are welcome.
func paint(w io.Writer, code, text string) string {
	if !coloured(w) {
		return text
	}
	return "\x1b[" + code + "m" + text + "\x1b[0m"
}

const (
	red    = "31"
	green  = "32"
	yellow = "33"
	faint  = "2"
)
