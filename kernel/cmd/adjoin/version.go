package main

import (
	"fmt"
	"runtime"
	"strings"

	"github.com/spf13/cobra"
	"golang.org/x/sys/cpu"

	"adjoin/kernel/engine"
	"adjoin/kernel/wire"
)

// facts is what version says.
type facts struct {
	Version      string   `json:"version"`
	Language     string   `json:"language"`
	Protocol     string   `json:"protocol"`
	Go           string   `json:"go"`
	System       string   `json:"system"`
	Instructions []string `json:"processor"`
}

func versionCommand() *cobra.Command {
	var asJSON bool
	c := &cobra.Command{
		Use:     "version",
		Short:   "Print the version and what the program runs on",
		Example: "  adjoin version\n  adjoin version --json",
		Args:    noArgs,
		RunE: func(c *cobra.Command, _ []string) error {
			f := facts{engine.Version, engine.Level, wire.Protocol, runtime.Version(), runtime.GOOS + "/" + runtime.GOARCH, instructions()}
			if asJSON {
				return writeJSON(c.OutOrStdout(), f)
			}
			_, err := fmt.Fprintf(c.OutOrStdout(), "adjoin     %s\nlanguage   %s\nprotocol   %s\nGo         %s\nsystem     %s\nprocessor  %s\n",
				f.Version, f.Language, f.Protocol, f.Go, f.System, strings.Join(f.Instructions, " "))
			return err
		},
	}
	c.Flags().BoolVar(&asJSON, "json", false, "print as JSON")
	return c
}

// instructions are the instruction sets of the processor that matter for
// arithmetic.
func instructions() []string {
	list := []string{}
	for _, i := range []struct {
		name string
		has  bool
	}{
		{"BMI2", cpu.X86.HasBMI2}, {"ADX", cpu.X86.HasADX}, {"PCLMULQDQ", cpu.X86.HasPCLMULQDQ}, {"AVX2", cpu.X86.HasAVX2},
		{"AVX-512F", cpu.X86.HasAVX512F}, {"AVX-512IFMA", cpu.X86.HasAVX512IFMA}, {"VPCLMULQDQ", cpu.X86.HasAVX512VPCLMULQDQ},
		{"GFNI", cpu.X86.HasAVX512GFNI}, {"NEON", cpu.ARM64.HasASIMD}, {"PMULL", cpu.ARM64.HasPMULL}, {"SVE", cpu.ARM64.HasSVE},
	} {
		if i.has {
			list = append(list, i.name)
		}
	}
	return list
}
