// Package viz makes a result into paper: one HTML file that opens from disk without a network, and the sequence sheet for print.
package viz
