// Command headfall plans gravity drain-downs of connected vessels.
package main

import (
	"context"
	"os"
	"os/signal"
	"syscall"

	"headfall/cmd/internal/cli"
)

func main() {
	signal.Ignore(syscall.SIGPIPE) // a reader that went away is an error of the write, and a quiet one
	ctx, restore := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	context.AfterFunc(ctx, restore) // the first Ctrl-C ends the calculation and keeps what is there; the second kills
	os.Exit(cli.Main(ctx, cli.System(), os.Args[1:]))
}
