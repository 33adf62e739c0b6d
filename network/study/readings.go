package study

import (
	"bufio"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"sort"
	"strings"

	"headfall/elements/quantity"
	"headfall/network"
)

// Reading is one level that was read.
type Reading struct {
	Time   float64 // s from the plan's start
	Vessel string
	Level  float64 // m above the vessel's base
	Text   string  // as it was written
	Row    int     // of the file, from 1
}

// Readings are the levels of one file, in the order of time.
type Readings struct {
	List    []Reading
	Vessels []string // in the order of the header
}

// ReadingFaults are all faults of a readings file.
type ReadingFaults []string

func (f ReadingFaults) Error() string { return strings.Join(f, "\n") }

const mostReadings = 1 << 20 // rows; more is no log of levels

// ReadReadings reads levels from CSV. The header is "time" and then tags, each with its unit in brackets: "T-1 [m]", "LT-1 [%]"; a vessel's
// own tag or its gauge's. Times are clocks ("06:20", "+1d 00:10"), moments ("2027-03-02 06:20") or durations from the start; bare numbers where
// the header says time [s] or [min]. Empty cells are not read. Lines that begin with # are words. The error is ReadingFaults.
func ReadReadings(r io.Reader, plant *network.Plant) (*Readings, error) {
	in := &readingsReader{plant: plant, out: &Readings{}}
	b := bufio.NewReader(r)
	if lead, err := b.Peek(3); err == nil && string(lead) == "\ufeff" {
		b.Discard(3)
	}
	c := csv.NewReader(b)
	c.Comment, c.FieldsPerRecord, c.TrimLeadingSpace = '#', -1, true
	if first, _ := b.Peek(4096); semicolons(string(first)) {
		c.Comma = ';'
	}
	for {
		record, err := c.Read()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			in.fault(0, "%v", err)
			break
		}
		row, _ := c.FieldPos(0)
		if in.columns == nil {
			in.header(record, row)
		} else {
			in.row(record, row)
		}
		if row > mostReadings {
			in.fault(row, "there are more rows than %d; thin the log out", mostReadings)
		}
		if len(in.faults) >= 20 || row > mostReadings || in.columns == nil {
			break
		}
	}
	return in.end()
}

// semicolons tells whether the header is set apart by semicolons.
func semicolons(lead string) bool {
	for _, line := range strings.Split(lead, "\n") {
		if line = strings.TrimSpace(line); line != "" && line[0] != '#' {
			return strings.Contains(line, ";") && !strings.Contains(line, ",")
		}
	}
	return false
}

type readingsReader struct {
	plant   *network.Plant
	out     *Readings
	unit    string // of bare times
	columns []readColumn
	faults  ReadingFaults
}

// readColumn is a vessel's column.
type readColumn struct {
	vessel *network.Vessel
	unit   string
	gauge  bool // shown by the gauge, from its zero
}

func (in *readingsReader) fault(row int, format string, args ...any) {
	s := fmt.Sprintf(format, args...)
	if row > 0 {
		s = fmt.Sprintf("row %d: %s", row, s)
	}
	in.faults = append(in.faults, s)
}

func (in *readingsReader) end() (*Readings, error) {
	if in.columns == nil && len(in.faults) == 0 {
		in.fault(0, "the file holds no header; it begins with: time,T-1 [m]")
	}
	if len(in.out.List) == 0 && len(in.faults) == 0 {
		in.fault(0, "the file holds no readings")
	}
	if len(in.faults) > 0 {
		return nil, in.faults
	}
	sort.SliceStable(in.out.List, func(i, k int) bool { return in.out.List[i].Time < in.out.List[k].Time })
	return in.out, nil
}

// row reads one line of readings.
func (in *readingsReader) row(record []string, row int) {
	if len(record) == 1 && strings.TrimSpace(record[0]) == "" {
		return
	}
	if len(record) > len(in.columns)+1 {
		in.fault(row, "there are %d fields, the header has %d", len(record), len(in.columns)+1)
		return
	}
	t, err := in.time(record[0])
	if err != nil {
		in.fault(row, "%v", err)
		return
	}
	for i, cell := range record[1:] {
		cell = strings.TrimSpace(cell)
		if cell == "" || cell == "-" {
			continue
		}
		level, err := in.columns[i].level(cell)
		if err != nil {
			in.fault(row, "%s: %v", in.columns[i].vessel.Tag, err)
			continue
		}
		in.out.List = append(in.out.List, Reading{Time: t, Vessel: in.columns[i].vessel.Tag, Level: level, Text: cell, Row: row})
	}
}

// time reads a moment, s from the start; bare numbers are in the unit of the header.
func (in *readingsReader) time(cell string) (float64, error) {
	cell = strings.TrimSpace(cell)
	if in.unit != "" && strings.Trim(cell, "0123456789.+-eE") == "" {
		cell += " " + in.unit
	}
	return MomentOf(in.plant, cell)
}

// MomentOf reads a moment of a plan, s from its start: a clock, a date with a clock, or how long after the start.
func MomentOf(p *network.Plant, text string) (float64, error) {
	if quantity.LooksLikeClock(text) {
		c, err := quantity.ParseClock(text)
		if err != nil {
			return 0, err
		}
		if p.Start.IsZero() {
			return 0, fmt.Errorf("%q is a clock time, and the plan has no start; write how long after it", text)
		}
		return c.Elapsed(p.Start), nil
	}
	if at, err := quantity.ParseDateTime(text); err == nil {
		if p.Start.IsZero() {
			return 0, fmt.Errorf("%q is a date, and the plan has no start; write how long after it", text)
		}
		return at.Sub(p.Start).Seconds(), nil
	}
	v, err := quantity.ParseTime(text)
	return v.SI, err
}
