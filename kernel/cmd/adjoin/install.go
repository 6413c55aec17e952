package main

import (
	"errors"
	"fmt"
	"os"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"adjoin/kernel/engine"
	"adjoin/kernelspec"
)

// place is where install and uninstall do their work, as flags say it.
type place struct {
	user, sysPrefix bool
	prefix          string
	name            string
}

func (p *place) flags(c *cobra.Command) {
	f := c.Flags()
	f.BoolVar(&p.user, "user", false, "in the user's Jupyter folder (the default)")
	f.BoolVar(&p.sysPrefix, "sys-prefix", false, "in the active Python environment")
	f.StringVar(&p.prefix, "prefix", "", "below this `folder`, as in folder/share/jupyter/kernels")
	f.StringVar(&p.name, "name", kernelspec.DefaultName, "`name` of the kernel's folder")
	c.MarkFlagsMutuallyExclusive("user", "sys-prefix", "prefix")
	f.SetNormalizeFunc(func(_ *pflag.FlagSet, name string) pflag.NormalizedName {
		if name == "sysprefix" {
			name = "sys-prefix"
		}
		return pflag.NormalizedName(name)
	})
}

func (p *place) target() (kernelspec.Target, error) {
	s := kernelspec.Here()
	t := kernelspec.Target{System: s, Data: s.UserData(), Name: p.name}
	switch {
	case p.prefix != "":
		t.Data = s.PrefixData(p.prefix)
	case p.sysPrefix:
		prefix := s.EnvironmentPrefix()
		if prefix == "" {
			return t, errors.New("there is no Python environment to install into; activate one, or name a folder with --prefix")
		}
		t.Data = s.PrefixData(prefix)
	}
	return t, nil
}

func installCommand() *cobra.Command {
	var p place
	var display string
	var copied, asJSON bool
	c := &cobra.Command{
		Use:   "install",
		Short: "Let Jupyter find the kernel",
		Long: `Writes the kernelspec into a folder where Jupyter looks. It records where this
program is, and so must be done again after the program has moved; doing it
again changes nothing otherwise.`,
		Example: `  adjoin install
  adjoin install --sys-prefix
  adjoin install --prefix /opt/jupyter --name adjoin-next --display-name 'Adjoin (next)'`,
		Args: noArgs,
		RunE: func(c *cobra.Command, _ []string) error {
			t, err := p.target()
			if err != nil {
				return err
			}
			t.DisplayName = display
			program, err := os.Executable()
			if err != nil {
				return err
			}
			dir, changed, err := kernelspec.Installation{Target: t, Program: program, Version: engine.Version, Copy: copied}.Install()
			if err != nil {
				return err
			}
			if asJSON {
				return writeJSON(c.OutOrStdout(), map[string]any{"folder": dir, "name": p.name, "changed": changed})
			}
			if changed {
				fmt.Fprintf(c.OutOrStdout(), "installed the kernel %s in %s\n", p.name, dir)
			} else {
				fmt.Fprintf(c.OutOrStdout(), "the kernel %s is in %s already\n", p.name, dir)
			}
			return nil
		},
	}
	p.flags(c)
	c.Flags().StringVar(&display, "display-name", kernelspec.DefaultDisplayName, "`name` that Jupyter shows")
	c.Flags().BoolVar(&copied, "copy", false, "put a copy of this program beside the kernelspec and let Jupyter start that")
	c.Flags().BoolVar(&asJSON, "json", false, "report as JSON")
	return c
}

func uninstallCommand() *cobra.Command {
	var p place
	var asJSON bool
	c := &cobra.Command{
		Use:   "uninstall",
		Short: "Take the kernel away from Jupyter",
		Long:  "Removes the kernelspec that install with the same flags has written. It is no\nerror when there is none.",
		Example: `  adjoin uninstall
  adjoin uninstall --prefix /opt/jupyter`,
		Args: noArgs,
		RunE: func(c *cobra.Command, _ []string) error {
			t, err := p.target()
			if err != nil {
				return err
			}
			dir, found, err := t.Uninstall()
			if err != nil {
				return err
			}
			if asJSON {
				return writeJSON(c.OutOrStdout(), map[string]any{"folder": dir, "name": p.name, "changed": found})
			}
			if found {
				fmt.Fprintf(c.OutOrStdout(), "removed %s\n", dir)
			} else {
				fmt.Fprintf(c.OutOrStdout(), "there is no kernel %s in %s\n", p.name, dir)
			}
			return nil
		},
	}
	p.flags(c)
	c.Flags().BoolVar(&asJSON, "json", false, "report as JSON")
	return c
}
