package display

import "github.com/rivo/uniseg"

// textWidth is the number of columns that s takes in a terminal: wide
// characters two, combining ones none.
func textWidth(s string) int { return uniseg.StringWidth(s) }
