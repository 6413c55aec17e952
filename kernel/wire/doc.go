// Package wire is the Jupyter message format: what the messages hold, how they
// are signed, and how they are laid out in frames. It opens no socket and keeps
// no state but the signatures it has seen.
//
// Where to start reading: message.go for the shape of a message, codec.go for
// frames and signatures, content.go for what each type of message holds.
//
// Reference: "Messaging in Jupyter", jupyter_client documentation, protocol
// version 5.5.
package wire
