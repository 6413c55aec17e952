package transport

import (
	"log"
	"time"

	"adjoin/kernel/zmtp"
)

// Options bound what peers may do. Zero fields take their default.
type Options struct {
	Handshake time.Duration // until a new peer has introduced itself; default 5 s
	Stall     time.Duration // without a byte read, until a peer counts as gone; default 10 s
	Patience  time.Duration // likewise, until Publisher.Wait no longer waits for it; default 1 s
	Peers     int           // connections at one time; default 256
	Room      int64         // bytes that wait for one peer when Publisher.Wait begins to wait; default 8 MiB
	Most      int64         // bytes that wait for one peer when it is given up; default 64 MiB
	Limits    zmtp.Limits
	Log       *log.Logger // default: none
}

func (o Options) filled() Options {
	if o.Handshake == 0 {
		o.Handshake = 5 * time.Second
	}
	if o.Stall == 0 {
		o.Stall = 10 * time.Second
	}
	if o.Patience == 0 {
		o.Patience = time.Second
	}
	if o.Peers == 0 {
		o.Peers = 256
	}
	if o.Room == 0 {
		o.Room = 8 << 20
	}
	if o.Most == 0 {
		o.Most = 64 << 20
	}
	if o.Limits == (zmtp.Limits{}) {
		o.Limits = zmtp.DefaultLimits
	}
	return o
}

func (o Options) logf(format string, args ...any) {
	if o.Log != nil {
		o.Log.Printf(format, args...)
	}
}
