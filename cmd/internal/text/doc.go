// Package text writes what a person reads on the terminal: the answer of a run, in the words of the trade and rounded to the safe side. It
// computes nothing; every number comes from a network.Result or a network.Plant.
package text
