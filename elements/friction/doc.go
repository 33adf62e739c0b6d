// Package friction holds friction factors, loss coefficients and discharge coefficients as pure functions with their sources. It knows no part,
// no liquid and no line.
package friction
