// Package transport is the two kinds of socket that a kernel listens on:
// Router, whose peers send requests and get replies, and Publisher, whose peers
// subscribe to broadcasts. It carries frames and knows nothing of what they
// mean; package zmtp says how frames look on the wire.
//
// Every connection has a goroutine that reads and one that writes, so that no
// peer can hold up another: not one that never says a word, nor one that talks
// nonsense, nor one that stops reading. Before its handshake is over a peer has
// a few seconds, a message has a largest size, and what waits to be written to
// one peer is bounded; who goes beyond is disconnected.
//
// Where to start reading: outbox.go, then router.go and publisher.go.
// Listen opens tcp and ipc addresses; Memory is a network inside the process,
// for tests and for programs that are their own client.
package transport
