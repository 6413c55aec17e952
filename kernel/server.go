package kernel

import (
	"context"
	"crypto/rand"
	"encoding/hex"
	"fmt"
	"log"
	"net"
	"sync"
	"sync/atomic"
	"time"
	"unicode/utf8"

	"adjoin/kernel/transport"
	"adjoin/kernel/wire"
)

// Listeners are the five channels of a kernel.
type Listeners struct {
	Shell, Control, Stdin, IOPub, Heartbeat net.Listener
}

// Options are what a server is made of.
type Options struct {
	Engine    Engine
	Scheme    string // of signatures; empty is hmac-sha256
	Key       []byte // empty: messages are not signed
	History   *History
	Transport transport.Options
	Log       *log.Logger // default: none

	quiet time.Duration // of cells on their way; default defaultQuiet
}

// Server is a running kernel.
type Server struct {
	engine  Engine
	codec   *wire.Codec
	history *History
	usage   usage
	log     *log.Logger

	session string // of this process, in the header of all messages
	serial  atomic.Uint64

	desk  desk
	queue *queue
	quiet time.Duration
	count int // cells counted so far; only the goroutine that runs cells uses it

	iopub                     *transport.Publisher
	shell, control, stdin, hb *transport.Router

	cellsDone chan struct{}
	stopping  chan struct{}
	stopOnce  sync.Once
}

// NewServer starts a kernel on the listeners, which it closes in the end.
func NewServer(l Listeners, o Options) (*Server, error) {
	codec, err := wire.NewCodec(o.Scheme, o.Key)
	if err != nil {
		return nil, err
	}
	s := &Server{
		engine:    o.Engine,
		codec:     codec,
		history:   o.History,
		log:       o.Log,
		session:   newID(),
		queue:     newQueue(),
		quiet:     o.quiet,
		cellsDone: make(chan struct{}),
		stopping:  make(chan struct{}),
	}
	if s.quiet == 0 {
		s.quiet = defaultQuiet
	}
	if s.history == nil {
		s.history = NewHistory("")
	}
	s.usage.start()
	s.desk = desk{publish: s.publish, logf: s.logf}
	t := o.Transport
	if t.Log == nil {
		t.Log = o.Log
	}
	s.iopub = transport.NewPublisher(l.IOPub, t, s.welcome)
	s.publish(nil, "status", wire.KernelStatus{State: wire.Starting})
	s.hb = transport.NewRouter(l.Heartbeat, t, func(r *transport.Router, frames [][]byte) { r.Send(frames) })
	// No cell asks its user yet, so whatever comes on stdin was not asked for.
	s.stdin = transport.NewRouter(l.Stdin, t, func(*transport.Router, [][]byte) {})
	s.shell = transport.NewRouter(l.Shell, t, s.receive)
	s.control = transport.NewRouter(l.Control, t, s.receive)
	go s.runCells()
	return s, nil
}

func newID() string {
	var b [16]byte
	_, _ = rand.Read(b[:]) // never fails
	return hex.EncodeToString(b[:])
}

// Interrupt stops the cell that runs and drops those that wait, as an
// interrupt_request does.
func (s *Server) Interrupt() { s.queue.interrupt() }

// grace is how long a shutdown waits for the cell that runs, and for clients
// to read what they have been sent.
const (
	graceCell  = 300 * time.Millisecond
	graceDrain = 400 * time.Millisecond
)

// Serve returns when ctx has ended or a client has asked for a shutdown. By
// then what was sent has been written and all channels are closed.
func (s *Server) Serve(ctx context.Context) {
	select {
	case <-ctx.Done():
	case <-s.stopping:
	}
	s.stop()
	s.queue.close()
	select {
	case <-s.cellsDone:
	case <-time.After(graceCell):
	}
	var all sync.WaitGroup
	for _, close := range []func(time.Duration){s.shell.Close, s.control.Close, s.iopub.Close, s.stdin.Close, s.hb.Close} {
		all.Go(func() { close(graceDrain) })
	}
	all.Wait()
}

func (s *Server) stop() { s.stopOnce.Do(func() { close(s.stopping) }) }

// receive takes a message that came on shell or control.
func (s *Server) receive(channel *transport.Router, frames [][]byte) {
	m, err := s.codec.Decode(frames)
	if err != nil {
		s.logf("a message is dropped: %v", err)
		return
	}
	r := &request{Message: m}
	r.send = func(kind string, content any) {
		channel.Send(s.encode(&wire.Message{Identities: m.Identities, Parent: m.Origin}, kind, content))
	}
	if m.Header.Type == "execute_request" {
		s.enqueue(r)
		return
	}
	s.answer(r)
	if r.then != nil {
		r.then()
	}
}

// publish broadcasts a message about parent, nil when it is about the kernel.
func (s *Server) publish(parent *wire.Message, kind string, content any) {
	topic := "kernel." + s.session + "." + kind
	if stream, ok := content.(wire.Stream); ok {
		topic = "stream." + stream.Name
	}
	m := &wire.Message{Identities: [][]byte{[]byte(topic)}}
	if parent != nil {
		m.Parent = parent.Origin
	}
	s.iopub.Publish(s.encode(m, kind, content))
}

// welcome is the first message of a new subscription.
func (s *Server) welcome(topic []byte) [][]byte {
	if !utf8.Valid(topic) {
		return nil
	}
	m := &wire.Message{Identities: [][]byte{topic}}
	return s.encode(m, "iopub_welcome", wire.Welcome{Subscription: string(topic)})
}

// encode completes m with a fresh header and content, and lays it out.
func (s *Server) encode(m *wire.Message, kind string, content any) [][]byte {
	m.Header = wire.Header{
		ID:       fmt.Sprintf("%s_%d", s.session, s.serial.Add(1)),
		Session:  s.session,
		Username: "kernel",
		Date:     time.Now().UTC().Format("2006-01-02T15:04:05.000000Z"),
		Type:     kind,
		Version:  wire.Protocol,
	}
	b, err := wire.Marshal(content)
	if err != nil {
		// A value that no JSON can hold: an engine's mistake, which its cell
		// must survive.
		s.logf("a %s cannot be sent: %v", kind, err)
		b, _ = wire.Marshal(wire.ErrorReply{Status: wire.StatusError, Error: defect(err).triple()})
	}
	m.Content = b
	frames, err := s.codec.Encode(m)
	if err != nil {
		panic(err) // a header is strings only
	}
	return frames
}

func (s *Server) logf(format string, args ...any) {
	if s.log != nil {
		s.log.Printf(format, args...)
	}
}
