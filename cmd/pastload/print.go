package main

import (
	"bytes"
	"encoding/json"

	"github.com/spf13/cobra"

	"pastload/profile"
	"pastload/render/report"
)

// show prints tables in the format asked for, or value as JSON. CSV holds one
// table, so it gets only the first.
func (c *common) show(cmd *cobra.Command, value any, tables ...*report.Table) error {
	var b bytes.Buffer
	switch c.format {
	case "json":
		if err := encode(&b, value); err != nil {
			return err
		}
	case "csv":
		if err := tables[0].WriteCSV(&b, c.unitSystem()); err != nil {
			return err
		}
	default:
		for i, t := range tables {
			if i > 0 {
				b.WriteByte('\n')
			}
			if err := t.WriteText(&b, c.unitSystem()); err != nil {
				return err
			}
		}
	}
	return c.deliver(cmd, b.Bytes())
}

// encode writes {"schema": 1, …} with the value's own keys.
func encode(b *bytes.Buffer, value any) error {
	raw, err := json.Marshal(value)
	if err != nil {
		return err
	}
	head, err := json.Marshal(struct {
		Schema int `json:"schema"`
	}{profile.Schema})
	if err != nil {
		return err
	}
	joined := append(head[:len(head)-1], ',')
	joined = append(joined, raw[1:]...)
	if err := json.Indent(b, joined, "", "  "); err != nil {
		return err
	}
	b.WriteByte('\n')
	return nil
}
