package main

import (
	"bytes"
	"strings"
	"testing"
)

// demoSite lays the worked scenario in a folder of its own.
func demoSite(tb testing.TB) string {
	tb.Helper()
	dir := tb.TempDir() + "/demo"
	var out, errw bytes.Buffer
	if status := run([]string{"init", dir, "--demo"}, strings.NewReader(""), &out, &errw); status != exitDone {
		tb.Fatal(errw.String())
	}
	return dir
}

// BenchmarkDemoReport runs the main job whole: tables in, page, drawings, CSV and
// workbook out.
func BenchmarkDemoReport(b *testing.B) {
	site, dir := demoSite(b), b.TempDir()
	for b.Loop() {
		var out, errw bytes.Buffer
		if status := run([]string{"report", site, "-o", dir + "/out", "--quiet"}, strings.NewReader(""), &out, &errw); status != exitDone {
			b.Fatal(errw.String())
		}
	}
}

// BenchmarkDemoProfile reads the worked scenario and computes its profile.
func BenchmarkDemoProfile(b *testing.B) {
	site := demoSite(b)
	for b.Loop() {
		var out, errw bytes.Buffer
		if status := run([]string{"profile", site, "--quiet"}, strings.NewReader(""), &out, &errw); status != exitDone {
			b.Fatal(errw.String())
		}
	}
}
