package intake

import (
	"fmt"
	"strings"
	"testing"
	"testing/fstest"

	"pastload/testdata"
)

// BenchmarkRead10000 reads a results table of 10,000 rows and nine quantities.
func BenchmarkRead10000(b *testing.B) {
	var t strings.Builder
	t.WriteString("borehole,depth (m),specimen,unit weight (kN/m3),water content (%),liquid limit (%),plastic limit (%),void ratio,preconsolidation stress (kPa),compression index,undrained strength (kPa),shear wave velocity (m/s),remark\n")
	for i := range 10_000 {
		fmt.Fprintf(&t, "BH%d,%.2f,U%d,%.1f,%.1f,%.1f,%.1f,%.3f,%.1f,%.2f,>%.1f,%.0f,as sampled\n",
			i%40+1, 0.5+float64(i/40)*0.1, i, 15+float64(i%40)/10, 40+float64(i%200)/10, 60.5, 28.5, 1.2+float64(i%100)/1000, 80+float64(i%500)/5, 0.45, 25.5, 140.0)
	}
	fsys := fstest.MapFS{"results.csv": {Data: []byte(t.String())}}
	b.SetBytes(int64(t.Len()))
	b.ReportAllocs()
	for b.Loop() {
		site, err := ReadFS(fsys, "site", Options{})
		if err != nil {
			b.Fatal(err)
		}
		if len(site.Boreholes) != 40 {
			b.Fatal(len(site.Boreholes))
		}
	}
}

// BenchmarkReadDemo reads the worked scenario: nine small tables.
func BenchmarkReadDemo(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		if _, err := ReadFS(testdata.Demo(), "demo", Options{}); err != nil {
			b.Fatal(err)
		}
	}
}
