// Package export writes results for other programs: CSV and JSON in SI units, and a spreadsheet in the display units of the plant. The same
// result always gives the same bytes.
package export
