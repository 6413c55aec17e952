// The program adjoin: a thin command line over the kernel and what lies below
// it. One file for each command; main.go has what they share.
package main
