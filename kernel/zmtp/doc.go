// Package zmtp reads and writes ZMTP 3.0, the protocol of ZeroMQ sockets,
// with the NULL mechanism: the handshake, frames, commands. It knows bytes and
// nothing of sockets' behaviour (queues, routing, subscriptions), which is
// package transport, or of Jupyter, which is package wire.
//
// Everything that comes from a peer is bounded before memory is taken for it:
// peers speak here before they have shown that they know the key.
//
// References: Pieter Hintjens, "ZeroMQ Message Transport Protocol", ZeroMQ RFC
// 23/ZMTP 3.0, 2013; commands PING and PONG, SUBSCRIBE and CANCEL after RFC
// 37/ZMTP 3.1, 2019, which newer peers may send.
//
// Where to start reading: conn.go; then handshake.go.
package zmtp
