package report

import (
	"bytes"
	"encoding/xml"
	"fmt"
	"image"
	"image/color"
	"image/png"
	"math"
	"strconv"
	"strings"
)

// emuPerMillimetre are the units of lengths of pictures in a word processor's file.
const emuPerMillimetre = 36000

// figure writes a drawing as a picture, as large as it was drawn or as the paper
// allows. The caption is left out where it only repeats the section's title.
func (x *docx) figure(f Figure, s Section, paper docxPaper) error {
	wide, high, words := svgSize(f.SVG)
	scale := math.Min(1, math.Min(paper.pictureWidth/wide, paper.pictureSpace/high))
	data, kind, err := x.fallback(f, wide, high)
	if err != nil {
		return fmt.Errorf("picture of %s: %w", f.ID, err)
	}
	x.figures++
	name := "picture" + strconv.Itoa(x.figures)
	x.media = append(x.media, docxPart{"word/media/" + name + "." + kind, data}, docxPart{"word/media/" + name + ".svg", f.SVG})
	cx, cy := int(wide*scale*emuPerMillimetre), int(high*scale*emuPerMillimetre)
	fmt.Fprintf(&x.body, `<w:p><w:pPr><w:pStyle w:val="Figure"/></w:pPr><w:r><w:drawing><wp:inline distT="0" distB="0" distL="0" distR="0"><wp:extent cx="%d" cy="%d"/><wp:docPr id="%d" name="%s" descr="%s"/><wp:cNvGraphicFramePr><a:graphicFrameLocks noChangeAspect="1"/></wp:cNvGraphicFramePr><a:graphic><a:graphicData uri="http://schemas.openxmlformats.org/drawingml/2006/picture"><pic:pic><pic:nvPicPr><pic:cNvPr id="%d" name="%s"/><pic:cNvPicPr/></pic:nvPicPr><pic:blipFill><a:blip r:embed="%s-%s"><a:extLst><a:ext uri="{96DAC541-7B7A-43D3-8B79-37D633B846F1}"><asvg:svgBlip r:embed="%s-svg"/></a:ext></a:extLst></a:blip><a:stretch><a:fillRect/></a:stretch></pic:blipFill><pic:spPr><a:xfrm><a:off x="0" y="0"/><a:ext cx="%d" cy="%d"/></a:xfrm><a:prstGeom prst="rect"><a:avLst/></a:prstGeom></pic:spPr></pic:pic></a:graphicData></a:graphic></wp:inline></w:drawing></w:r></w:p>`,
		cx, cy, x.figures, name, xmlText(join(". ", f.Caption, words)), x.figures, name, name, kind, name, cx, cy)
	if f.Caption != s.Title {
		x.paragraph("FigureCaption", f.Caption)
	}
	return nil
}

// fallback returns what a program that does not show SVG shows: the picture that
// the caller gives, else a metafile, else a plate that says what is missing.
func (x *docx) fallback(f Figure, wide, high float64) (data []byte, kind string, err error) {
	if x.picture != nil {
		if data, err = x.picture(f); err != nil || data != nil {
			return data, "png", err
		}
	}
	if data, err = metafileOf(f.SVG); err == nil {
		return data, "emf", nil
	}
	data, err = plateOf(wide, high)
	return data, "png", err
}

// svgSize returns the size of a drawing in mm and its description. A drawing
// that does not tell is taken as half an A4 page.
func svgSize(svg []byte) (wide, high float64, words string) {
	wide, high = 170, 120
	d := xml.NewDecoder(bytes.NewReader(svg))
	inside := false
	for {
		token, err := d.Token()
		if err != nil {
			return wide, high, words
		}
		switch token := token.(type) {
		case xml.StartElement:
			switch {
			case token.Name.Local == "svg":
				for _, a := range token.Attr {
					if v, ok := millimetres(a.Value); ok && a.Name.Local == "width" {
						wide = v
					} else if ok && a.Name.Local == "height" {
						high = v
					}
				}
			case token.Name.Local == "desc":
				inside = true
			case token.Name.Local != "title":
				return wide, high, words // title and description come first
			}
		case xml.CharData:
			if inside {
				words += string(token)
			}
		case xml.EndElement:
			inside = inside && token.Name.Local != "desc"
		}
	}
}

// millimetres reads a length of a drawing. Without a unit it is a pixel of 1/96 in.
func millimetres(text string) (float64, bool) {
	factor := 25.4 / 96
	number := strings.TrimSpace(text)
	for unit, f := range map[string]float64{"mm": 1, "cm": 10, "in": 25.4, "pt": 25.4 / 72, "px": 25.4 / 96} {
		if s, ok := strings.CutSuffix(number, unit); ok {
			number, factor = s, f
			break
		}
	}
	v, err := strconv.ParseFloat(number, 64)
	v *= factor
	return v, err == nil && v > 0 && v < 5000
}

// plateOf returns a PNG of the shape of a drawing for programs that do not show
// SVG: a frame, and a sentence that says what is missing.
func plateOf(wide, high float64) ([]byte, error) {
	const dots = 2 // per mm
	w, h := max(40, int(wide*dots)), max(20, int(high*dots))
	m := image.NewPaletted(image.Rect(0, 0, w, h), color.Palette{color.White, color.Gray{0x60}})
	for x := range w {
		m.SetColorIndex(x, 0, 1)
		m.SetColorIndex(x, h-1, 1)
	}
	for y := range h {
		m.SetColorIndex(0, y, 1)
		m.SetColorIndex(w-1, y, 1)
	}
	for i, line := range []string{"THE DRAWING IS IN THIS FILE AS SVG.", "THIS PROGRAM DOES NOT SHOW IT."} {
		lettering(m, line, h/2-12+i*14)
	}
	var b bytes.Buffer
	e := png.Encoder{CompressionLevel: png.BestCompression}
	err := e.Encode(&b, m)
	return b.Bytes(), err
}

// lettering draws capitals of 5 by 7 dots in the middle of a picture, from a
// height down; nothing where it is too narrow for them.
func lettering(m *image.Paletted, text string, top int) {
	const advance = 6
	left := (m.Rect.Dx() - advance*len(text)) / 2
	if left < 1 {
		return
	}
	for i, r := range text {
		for y, row := range letters[r] {
			for x := range 5 {
				if row&(16>>x) != 0 {
					m.SetColorIndex(left+i*advance+x, top+y, 1)
				}
			}
		}
	}
}

// letters are the shapes that the plate needs, five dots to a row.
var letters = map[rune][7]uint8{
	'A': {14, 17, 17, 31, 17, 17, 17}, 'D': {30, 17, 17, 17, 17, 17, 30}, 'E': {31, 16, 16, 30, 16, 16, 31},
	'F': {31, 16, 16, 30, 16, 16, 16}, 'G': {14, 17, 16, 23, 17, 17, 14}, 'H': {17, 17, 17, 31, 17, 17, 17},
	'I': {14, 4, 4, 4, 4, 4, 14}, 'L': {16, 16, 16, 16, 16, 16, 31}, 'M': {17, 27, 21, 21, 17, 17, 17},
	'N': {17, 25, 21, 19, 17, 17, 17}, 'O': {14, 17, 17, 17, 17, 17, 14}, 'P': {30, 17, 17, 30, 16, 16, 16},
	'R': {30, 17, 17, 30, 20, 18, 17}, 'S': {15, 16, 16, 14, 1, 1, 30}, 'T': {31, 4, 4, 4, 4, 4, 4},
	'V': {17, 17, 17, 17, 17, 10, 4}, 'W': {17, 17, 17, 21, 21, 21, 10}, '.': {0, 0, 0, 0, 0, 4, 4},
}
