package report

// The fixed parts of a word processor's file.
const (
	xmlHead    = `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>` + "\n"
	docxSpaces = `xmlns:w="http://schemas.openxmlformats.org/wordprocessingml/2006/main" xmlns:r="http://schemas.openxmlformats.org/officeDocument/2006/relationships"`
	docxHead   = xmlHead + `<w:document ` + docxSpaces + ` xmlns:wp="http://schemas.openxmlformats.org/drawingml/2006/wordprocessingDrawing" xmlns:a="http://schemas.openxmlformats.org/drawingml/2006/main" xmlns:pic="http://schemas.openxmlformats.org/drawingml/2006/picture" xmlns:asvg="http://schemas.microsoft.com/office/drawing/2016/SVG/main"><w:body>`
	docxEnd    = `</w:body></w:document>`

	docxTypes = xmlHead + `<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types">` +
		`<Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/>` +
		`<Default Extension="xml" ContentType="application/xml"/>` +
		`<Default Extension="png" ContentType="image/png"/><Default Extension="emf" ContentType="image/x-emf"/><Default Extension="svg" ContentType="image/svg+xml"/>` +
		`<Override PartName="/docProps/core.xml" ContentType="application/vnd.openxmlformats-package.core-properties+xml"/>` +
		`<Override PartName="/word/document.xml" ContentType="application/vnd.openxmlformats-officedocument.wordprocessingml.document.main+xml"/>` +
		`<Override PartName="/word/styles.xml" ContentType="application/vnd.openxmlformats-officedocument.wordprocessingml.styles+xml"/>` +
		`<Override PartName="/word/numbering.xml" ContentType="application/vnd.openxmlformats-officedocument.wordprocessingml.numbering+xml"/>` +
		`<Override PartName="/word/settings.xml" ContentType="application/vnd.openxmlformats-officedocument.wordprocessingml.settings+xml"/>` +
		`<Override PartName="/word/footer-portrait.xml" ContentType="application/vnd.openxmlformats-officedocument.wordprocessingml.footer+xml"/>` +
		`<Override PartName="/word/footer-across.xml" ContentType="application/vnd.openxmlformats-officedocument.wordprocessingml.footer+xml"/>` +
		`<Override PartName="/word/footer-sheet.xml" ContentType="application/vnd.openxmlformats-officedocument.wordprocessingml.footer+xml"/></Types>`

	docxRels = xmlHead + `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships">` +
		`<Relationship Id="document" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/officeDocument" Target="word/document.xml"/>` +
		`<Relationship Id="core" Type="http://schemas.openxmlformats.org/package/2006/relationships/metadata/core-properties" Target="docProps/core.xml"/></Relationships>`

	// docxCore takes the title and two dates.
	docxCore = xmlHead + `<cp:coreProperties xmlns:cp="http://schemas.openxmlformats.org/package/2006/metadata/core-properties" xmlns:dc="http://purl.org/dc/elements/1.1/" xmlns:dcterms="http://purl.org/dc/terms/" xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance">` +
		`<dc:title>%s</dc:title><dc:creator>pastload</dc:creator><dcterms:created xsi:type="dcterms:W3CDTF">%s</dcterms:created><dcterms:modified xsi:type="dcterms:W3CDTF">%s</dcterms:modified></cp:coreProperties>`

	docxSettings = xmlHead + `<w:settings ` + docxSpaces + `><w:zoom w:percent="100"/><w:defaultTabStop w:val="720"/><w:compat><w:compatSetting w:name="compatibilityMode" w:uri="http://schemas.microsoft.com/office/word" w:val="15"/></w:compat></w:settings>`

	docxNumbering = xmlHead + `<w:numbering ` + docxSpaces + `><w:abstractNum w:abstractNumId="0"><w:multiLevelType w:val="singleLevel"/><w:lvl w:ilvl="0"><w:start w:val="1"/><w:numFmt w:val="bullet"/><w:lvlText w:val="•"/><w:lvlJc w:val="left"/><w:pPr><w:ind w:left="397" w:hanging="284"/></w:pPr></w:lvl></w:abstractNum><w:num w:numId="1"><w:abstractNumId w:val="0"/></w:num></w:numbering>`
)

// docxStyles are the styles of paragraphs and tables: black on white, sizes in
// half points, spaces in twentieths of a point.
var docxStyles = xmlHead + `<w:styles ` + docxSpaces + `>` +
	`<w:docDefaults><w:rPrDefault><w:rPr><w:rFonts w:ascii="Arial" w:hAnsi="Arial" w:cs="Arial" w:eastAsia="Arial"/><w:sz w:val="20"/><w:szCs w:val="20"/><w:lang w:val="en-GB"/></w:rPr></w:rPrDefault><w:pPrDefault><w:pPr><w:spacing w:after="100" w:line="264" w:lineRule="auto"/></w:pPr></w:pPrDefault></w:docDefaults>` +
	`<w:style w:type="paragraph" w:default="1" w:styleId="Normal"><w:name w:val="Normal"/><w:qFormat/></w:style>` +
	docxStyle("Title", "Title", `<w:spacing w:before="240" w:after="60"/>`, `<w:b/><w:sz w:val="40"/>`) +
	docxStyle("Subtitle", "Subtitle", `<w:spacing w:after="240"/>`, `<w:sz w:val="26"/>`) +
	docxStyle("Heading1", "heading 1", `<w:keepNext/><w:keepLines/><w:spacing w:before="280" w:after="100"/><w:outlineLvl w:val="0"/>`, `<w:b/><w:sz w:val="28"/>`) +
	docxStyle("ListBullet", "List Bullet", `<w:numPr><w:ilvl w:val="0"/><w:numId w:val="1"/></w:numPr><w:spacing w:after="60"/>`, ``) +
	docxStyle("Caption", "caption", `<w:keepNext/><w:spacing w:before="180" w:after="60"/>`, `<w:b/><w:sz w:val="19"/>`) +
	docxStyle("Note", "Note", `<w:spacing w:after="160" w:line="240" w:lineRule="auto"/>`, `<w:i/><w:sz w:val="17"/>`) +
	docxStyle("Figure", "Figure", `<w:spacing w:before="0" w:after="0" w:line="240" w:lineRule="auto"/><w:jc w:val="center"/>`, ``) +
	docxStyle("FigureCaption", "Figure Caption", `<w:spacing w:before="60" w:after="200"/><w:jc w:val="center"/>`, `<w:sz w:val="19"/>`) +
	docxStyle("Footer", "footer", `<w:spacing w:after="0" w:line="240" w:lineRule="auto"/>`, `<w:sz w:val="16"/>`) +
	docxStyle("SectionEnd", "Section End", `<w:spacing w:before="0" w:after="0" w:line="20" w:lineRule="exact"/>`, `<w:sz w:val="2"/>`) +
	docxStyle("AfterTable", "After Table", `<w:spacing w:before="0" w:after="0" w:line="120" w:lineRule="exact"/>`, `<w:sz w:val="4"/>`) +
	docxTableStyles("", "17") + docxTableStyles("Small", "14") +
	`<w:style w:type="table" w:default="1" w:styleId="TableNormal"><w:name w:val="Normal Table"/><w:tblPr><w:tblInd w:w="0" w:type="dxa"/></w:tblPr></w:style>` +
	`<w:style w:type="table" w:styleId="Ruled"><w:name w:val="Ruled"/><w:basedOn w:val="TableNormal"/><w:tblPr><w:tblBorders><w:top w:val="single" w:sz="8" w:space="0" w:color="000000"/><w:bottom w:val="single" w:sz="8" w:space="0" w:color="000000"/><w:insideH w:val="single" w:sz="4" w:space="0" w:color="A0A0A0"/></w:tblBorders><w:tblCellMar><w:left w:w="57" w:type="dxa"/><w:right w:w="57" w:type="dxa"/></w:tblCellMar></w:tblPr>` +
	`<w:tblStylePr w:type="firstRow"><w:tcPr><w:tcBorders><w:bottom w:val="single" w:sz="8" w:space="0" w:color="000000"/></w:tcBorders></w:tcPr></w:tblStylePr></w:style>` +
	`</w:styles>`

func docxStyle(id, name, paragraph, run string) string {
	return `<w:style w:type="paragraph" w:styleId="` + id + `"><w:name w:val="` + name + `"/><w:basedOn w:val="Normal"/><w:qFormat/><w:pPr>` + paragraph + `</w:pPr><w:rPr>` + run + `</w:rPr></w:style>`
}

// docxTableStyles returns the styles of the cells of a table of a size.
func docxTableStyles(suffix, size string) string {
	const tight = `<w:spacing w:before="20" w:after="20" w:line="240" w:lineRule="auto"/>`
	name := "Table "
	if suffix != "" {
		name = "Table " + suffix + " "
	}
	run := `<w:sz w:val="` + size + `"/>`
	return docxStyle("TableText"+suffix, name+"Text", tight, run) +
		docxStyle("TableNumber"+suffix, name+"Number", tight+`<w:jc w:val="right"/>`, run) +
		docxStyle("TableHead"+suffix, name+"Head", `<w:keepNext/>`+tight, `<w:b/>`+run) +
		docxStyle("TableHead"+suffix+"Number", name+"Head Number", `<w:keepNext/>`+tight+`<w:jc w:val="right"/>`, `<w:b/>`+run)
}
