// Package kernelspec is what Jupyter must find on disk to start the kernel: the
// file kernel.json and the logos, and where they have to be.
//
// Where to start reading: install.go; paths.go for where Jupyter looks. The
// logos are drawn by package mark; "go test ./kernelspec -update" draws them
// anew.
//
// References: "Making kernels for Jupyter", jupyter_client documentation;
// "Common directories and file locations", Jupyter documentation; Jupyter
// Enhancement Proposal 105, "Kernelspec specification".
package kernelspec
