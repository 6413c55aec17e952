package transport

import (
	"encoding/binary"
	"net"

	"adjoin/kernel/zmtp"
)

// Router is a socket whose peers send requests and get replies. The first
// frame of what it hands out, and of what it sends, names the peer.
type Router struct {
	acceptor
	handle func(r *Router, frames [][]byte)

	// Guarded by acceptor.mu.
	named map[string]*peer // the newest peer of each name
	count uint64           // of peers that came without a name
}

// NewRouter serves the peers that come to l. Handle is called for each of
// their messages, for one peer in the order it sends them, on the goroutine
// that reads from it: while handle runs, nothing more is read from that peer.
func NewRouter(l net.Listener, o Options, handle func(r *Router, frames [][]byte)) *Router {
	r := &Router{handle: handle, named: map[string]*peer{}}
	r.acceptor = acceptor{listener: l, own: zmtp.Router, o: o.filled(), serve: r.serve}
	r.start()
	return r
}

// Send sends frames to the peer that the first of them names, without waiting
// for it. It returns false when there is no such peer any more.
func (r *Router) Send(frames [][]byte) bool {
	if len(frames) < 2 {
		return false
	}
	r.mu.Lock()
	p := r.named[string(frames[0])]
	r.mu.Unlock()
	return p != nil && p.out.put(zmtp.AppendMessage(nil, frames[1:]...))
}

func (r *Router) serve(p *peer) {
	name := r.register(p)
	defer r.forget(name, p)
	for {
		k, err := p.read()
		if err != nil {
			return
		}
		if k.Command == "" {
			r.handle(r, append([][]byte{[]byte(name)}, k.Frames...))
		}
	}
}

// register gives the peer the name it asks for. A peer that comes back under
// its old name gets what is sent there from then on. Names that begin with a
// zero byte are ours to give.
func (r *Router) register(p *peer) string {
	r.mu.Lock()
	defer r.mu.Unlock()
	name := string(p.Identity)
	if name == "" || name[0] == 0 {
		r.count++
		name = string(binary.BigEndian.AppendUint64([]byte{0}, r.count))
	}
	r.named[name] = p
	return name
}

func (r *Router) forget(name string, p *peer) {
	r.mu.Lock()
	defer r.mu.Unlock()
	if r.named[name] == p {
		delete(r.named, name)
	}
}
