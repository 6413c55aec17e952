package main

import (
	"time"

	"github.com/spf13/pflag"

	"adjoin/eval"
)

// budget is what a cell may take, as flags say it.
type budget struct {
	time   time.Duration
	memory int
}

func (b *budget) flags(f *pflag.FlagSet) {
	f.DurationVar(&b.time, "time", 0, "what each cell may take, such as 90s (default 10m)")
	f.IntVar(&b.memory, "memory", 0, "`MiB` that each cell may take (default 2048)")
}

func (b *budget) options() eval.Options {
	return eval.Options{Budget: eval.Budget{Time: b.time, Memory: int64(b.memory) << 20}}
}
