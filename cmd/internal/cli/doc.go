// Package cli is the command line: one file a command. A command reads options, calls the packages that do the work and writes what they give
// back; it computes nothing itself. Every command registers itself in one list (commands.go).
package cli
