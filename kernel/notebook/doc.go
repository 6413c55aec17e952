// Package notebook reads, runs and writes notebooks of nbformat 4, and shows
// them as a page of HTML that needs no network. What it writes has the same
// bytes every time: sorted keys, ids of cells that depend on the notebook
// alone, nothing about the machine or the time.
//
// Where to start reading: notebook.go for the format, runner.go for how cells
// are run in a kernel, page.go for the page.
//
// Reference: "The Jupyter Notebook Format", nbformat documentation, version
// 4.5; Jupyter Enhancement Proposal 62, "Cell ids".
package notebook
