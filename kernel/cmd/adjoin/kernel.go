package main

import (
	"errors"
	"os"
	"path/filepath"

	"github.com/spf13/cobra"

	"adjoin/kernel"
	"adjoin/kernel/engine"
)

func kernelCommand() *cobra.Command {
	var file string
	var b budget
	c := &cobra.Command{
		Use:     "kernel --connection-file FILE",
		Short:   "Serve a Jupyter client (started by Jupyter itself)",
		Long:    "Serves the Jupyter protocol on the addresses in a connection file, or, given a\nregistration file, on free ports that it then tells.\n\nThe environment variable ADJOIN_HISTORY names the file that keeps the inputs of\nall sessions; with the value none they are not kept.",
		Example: "  adjoin kernel --connection-file kernel-1.json",
		Args:    noArgs,
		RunE: func(c *cobra.Command, _ []string) error {
			if file == "" {
				return usageError{errors.New("--connection-file is missing; Jupyter gives it when it starts the kernel")}
			}
			return serve(file, b)
		},
	}
	c.Flags().StringVarP(&file, "connection-file", "f", "", "connection or registration `file`")
	b.flags(c.Flags())
	return c
}

func serve(file string, b budget) error {
	o := kernel.Options{
		Engine:  engine.New(b.options()),
		History: kernel.NewHistory(kernel.DefaultHistory()),
		Log:     kernel.NewLog(os.Stderr, "adjoin: "),
	}
	r, ok, err := kernel.ReadRegistration(file)
	if err != nil {
		return err
	}
	if !ok {
		c, err := kernel.ReadConnection(file)
		if err != nil {
			return err
		}
		return kernel.Run(&c, o)
	}
	l, c, err := r.Register()
	if err != nil {
		return err
	}
	own := filepath.Join(filepath.Dir(file), "kernel-"+filepath.Base(r.KernelID)+".json")
	if own != file {
		if err := c.Write(own); err == nil {
			defer os.Remove(own)
		}
	}
	return kernel.RunOn(l, c, o)
}
