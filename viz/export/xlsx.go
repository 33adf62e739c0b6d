package export

import (
	"archive/zip"
	"bytes"
	"io"
	"math"
	"sort"

	"github.com/xuri/excelize/v2"

	"headfall/network"
)

// bookTime stands for every time stamp in a workbook, so that the same result gives the same bytes.
const bookTime = "2000-01-01T00:00:00Z"

// XLSX writes r as a workbook: a summary, one sheet a table, one sheet a kind of series. Numbers are numbers, in the display units of the plant;
// the header row says which and stays in view.
func XLSX(w io.Writer, plant *network.Plant, r *network.Result) error {
	f := excelize.NewFile()
	defer f.Close()
	head, err := f.NewStyle(&excelize.Style{
		Font:      &excelize.Font{Bold: true},
		Fill:      excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{"E6EBEF"}},
		Border:    []excelize.Border{{Type: "bottom", Style: 1, Color: "000000"}},
		Alignment: &excelize.Alignment{WrapText: true, Vertical: "top"},
	})
	if err != nil {
		return err
	}
	for i, t := range sheets(plant, r) {
		if i == 0 {
			err = f.SetSheetName("Sheet1", t.name)
		} else {
			_, err = f.NewSheet(t.name)
		}
		if err != nil {
			return err
		}
		if err := fill(f, t, head); err != nil {
			return err
		}
	}
	if err := f.SetDocProps(&excelize.DocProperties{Creator: r.Program.Name, LastModifiedBy: r.Program.Name, Title: cell(plant.Title).(string),
		Revision: "1", Version: "1.0", Created: bookTime, Modified: bookTime}); err != nil {
		return err
	}
	var raw bytes.Buffer
	if err := f.Write(&raw); err != nil {
		return err
	}
	return repack(w, raw.Bytes())
}

// fill streams a table into its sheet.
func fill(f *excelize.File, t table, head int) error {
	s, err := f.NewStreamWriter(t.name)
	if err != nil {
		return err
	}
	for i, width := range t.widths {
		if err := s.SetColWidth(i+1, i+1, width); err != nil {
			return err
		}
	}
	if err := s.SetPanes(&excelize.Panes{Freeze: true, XSplit: 1, YSplit: 1, TopLeftCell: "B2", ActivePane: "bottomRight"}); err != nil {
		return err
	}
	row := make([]any, 0, len(t.head))
	for _, h := range t.head {
		row = append(row, excelize.Cell{StyleID: head, Value: cell(h)})
	}
	if err := s.SetRow("A1", row); err != nil {
		return err
	}
	for i := range t.rows() {
		row = row[:0]
		for _, v := range t.row(i) {
			row = append(row, cell(v))
		}
		at, err := excelize.CoordinatesToCellName(1, i+2)
		if err != nil {
			return err
		}
		if err := s.SetRow(at, row); err != nil {
			return err
		}
	}
	return s.Flush()
}

// cell makes v fit to stand in a cell: no NaN, no text longer than a cell takes, no characters that XML refuses.
func cell(v any) any {
	switch x := v.(type) {
	case float64:
		if math.IsNaN(x) || math.IsInf(x, 0) {
			return nil
		}
	case *float64:
		if x == nil {
			return nil
		}
		return cell(*x)
	case string:
		const most = 32000
		out := make([]rune, 0, len(x))
		for _, c := range x {
			if c < ' ' && c != '\n' && c != '\t' || c == 0xFFFE || c == 0xFFFF {
				c = '?'
			}
			if out = append(out, c); len(out) == most {
				break
			}
		}
		return string(out)
	}
	return v
}

// repack writes the archive again with its entries in order and without times.
func repack(w io.Writer, raw []byte) error {
	in, err := zip.NewReader(bytes.NewReader(raw), int64(len(raw)))
	if err != nil {
		return err
	}
	sort.Slice(in.File, func(i, j int) bool {
		// The list of contents comes first, as readers of the format expect.
		a, b := in.File[i].Name, in.File[j].Name
		if first := "[Content_Types].xml"; a == first || b == first {
			return a == first && b != first
		}
		return a < b
	})
	out := zip.NewWriter(w)
	for _, entry := range in.File {
		to, err := out.CreateHeader(&zip.FileHeader{Name: entry.Name, Method: zip.Deflate})
		if err != nil {
			return err
		}
		from, err := entry.Open()
		if err != nil {
			return err
		}
		if _, err := io.Copy(to, from); err != nil {
			return err
		}
		if err := from.Close(); err != nil {
			return err
		}
	}
	return out.Close()
}
