// Package client talks to a Jupyter kernel over its wire protocol: it sends
// requests and waits for what belongs to them. The program runs notebooks with
// it, and the tests of the kernel are clients of this kind.
package client
