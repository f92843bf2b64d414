// Package testdata holds the worked scenario that pastload carries with it: the
// tables of an invented site on an estuary, with deliberate faults that
// demo-faults.md lists. Nothing in it is a record of real ground.
package testdata

import (
	"embed"
	"io/fs"
)

//go:embed demo
var tables embed.FS

// Demo returns the tables of the worked scenario: one CSV file per table, named
// after it, at the root of the file system returned.
func Demo() fs.FS {
	demo, err := fs.Sub(tables, "demo")
	if err != nil {
		// The folder is part of the binary, so only our own slip can get here.
		panic("testdata: the demo is not embedded: " + err.Error())
	}
	return demo
}
