module adjoin

go 1.26.0

require (
	codeberg.org/go-pdf/fpdf v0.12.0
	github.com/alecthomas/participle/v2 v2.1.4
	github.com/go-fonts/liberation v0.3.3
	github.com/go-zeromq/zmq4 v0.17.0
	github.com/rivo/uniseg v0.4.7
	github.com/rogpeppe/go-internal v1.14.1
	github.com/spf13/cobra v1.10.2
	github.com/spf13/pflag v1.0.9
	github.com/yuin/goldmark v1.8.7
	golang.org/x/image v0.41.0
	golang.org/x/sys v0.50.0
	golang.org/x/term v0.48.0
)

require (
	github.com/go-zeromq/goczmq/v4 v4.2.2 // indirect
	github.com/inconshreveable/mousetrap v1.1.0 // indirect
	golang.org/x/sync v0.20.0 // indirect
	golang.org/x/text v0.37.0 // indirect
)
