//go:build !linux

package kernel

import "time"

// Elsewhere the processor's time and the machine's memory are not known.

func processorTime() time.Duration { return 0 }
func residentMemory() int64        { return heapMemory() }
func hostMemory() *HostMemory      { return nil }
