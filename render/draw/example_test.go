package draw_test

import (
	"fmt"
	"os"
	"strings"

	"pastload/render/draw"
)

func ExampleCanvas() {
	c := draw.New(draw.Sheet{Width: 60, Height: 20, ID: "figure1", Title: "One line", Description: "A line with its name."})
	c.Line(5, 10, 55, 10, draw.Pen{Width: draw.Medium})
	c.Text(30, 8, draw.Text("σ′").Sub("v0").Add(" (kPa)"), draw.Font{Size: 8, Anchor: draw.Middle})
	var b strings.Builder
	if err := c.Finish(&b); err != nil {
		fmt.Println(err)
		return
	}
	for _, line := range strings.Split(b.String(), "\n") {
		if strings.HasPrefix(line, "<line") || strings.HasPrefix(line, "<text") {
			fmt.Fprintln(os.Stdout, line)
		}
	}
	// Output:
	// <line x1="5" y1="10" x2="55" y2="10" stroke="#000000" stroke-width="0.25" />
	// <text x="23.8" y="8" font-size="2.82" fill="#000000" >σ′</text>
	// <text x="26.07" y="8.51" font-size="2.47" fill="#000000" >v0</text>
	// <text x="29.46" y="8" font-size="2.82" fill="#000000" >(kPa)</text>
}
