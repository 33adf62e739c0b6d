// Package quantity reads and writes the dimensional values of a scenario:
// "80 mm", "2 bar(g)", "0.62 ± 0.04", "0.58 to 0.66", "1 h 20 min", "06:30".
//
// Inside the program everything is SI; units exist only in this package, at
// the two borders. Three promises hold:
//
//   - A number with its unit becomes the float64 nearest to the exact product
//     of the decimal as written and the exact conversion factor: one rounding,
//     so "80 mm" is 0.08 and "0.08 m" is the same bits.
//   - What was read can be written again ([Value.Echo], [FormatExact]) and then
//     reads back to the same bits.
//   - Nothing is guessed: a missing or wrong unit, a decimal comma or a
//     thousands separator is an [*Error] that shows the right spelling.
//
// Conversion factors are stated as decimal text beside their source, mostly
// NIST Special Publication 811 (2008), appendix B, "SP 811" below, and the BIPM
// SI Brochure, 9th edition (2019), table 8.
package quantity
