package cli

import (
	"context"
	"errors"
	"io"

	"headfall/cmd/internal/text"
	"headfall/network"
	"headfall/network/study"
	"headfall/viz/export"
)

// opened is a plant file that was read.
type opened struct {
	src   *source
	plant *network.Plant
	load  func() (*network.Plant, error) // makes a plant for every worker
}

// open reads a plant file; a fault of the file ends with code 2, before anything is computed.
func (a *app) open(ctx context.Context, path string) (*opened, error) {
	src, err := a.read(ctx, path)
	if err != nil {
		return nil, err
	}
	load := func() (*network.Plant, error) { return a.load(src, &a.opt) }
	plant, err := load()
	return &opened{src, plant, load}, err
}

// ending is an answer that says how it ended; a nil one is none.
type ending interface {
	comparable
	End(exit int, why string)
	Exit() int
}

// conclude calculates the answer of a study that reads the files named, writes it and prints its page.
func conclude[R ending](ctx context.Context, a *app, bar *progress, read []string, calculate func(context.Context) (R, error), page func(io.Writer, R, text.Options) error) error {
	var res R
	var files outputs
	files.add(a.opt.json, func(w io.Writer) error { return export.JSON(w, res) })
	if err := files.check(read...); err != nil {
		return err
	}
	ctx, cancel := a.within(ctx)
	defer cancel()
	res, err := calculate(ctx)
	bar.end()
	if err = ended(ctx, a, err, res); err != nil {
		return err
	}
	return a.tell(files, res.Exit(), func(w io.Writer, opt text.Options) error { return page(w, res, opt) })
}

// ended sorts out how a study ended. With an answer, whole or in part, it returns nil; the part is marked.
func ended[R ending](ctx context.Context, a *app, err error, part R) error {
	var misuse study.Misuse
	var none R
	switch {
	case err == nil:
		return nil
	case errors.As(err, &misuse):
		return &Exit{Code: ExitBad, Err: misuse.Err}
	case part == none:
		return a.unfinished(ctx, err)
	}
	var e *Exit
	if errors.As(err, &e) {
		return err
	}
	_, why, exit := halted(ctx, err)
	part.End(exit, why)
	return nil
}

// halted says how a study that did not come to its end stopped: the words, why, and the exit code.
func halted(ctx context.Context, err error) (stopped, why string, exit int) {
	switch cause := context.Cause(ctx); {
	case errors.Is(cause, errTimeout):
		return "interrupted", "the time allowed by --timeout was over", ExitUnfinished
	case ctx.Err() != nil:
		return "interrupted", "interrupted", ExitInterrupted
	}
	return "failed", err.Error(), ExitUnfinished
}

// tell writes the files of a study and then its page.
func (a *app) tell(files outputs, exit int, page func(io.Writer, text.Options) error) error {
	a.settled = exit
	if err := files.save(a.Out); err != nil {
		return err
	}
	opt := text.Options{Width: a.Width, Colour: a.colour() && !files.toOut(), Quiet: a.opt.quiet, Set: a.opt.set}
	for _, f := range files {
		if f.path != "-" {
			opt.Saved = append(opt.Saved, f.path)
		}
	}
	if err := buffered(a.words(files), func(w io.Writer) error { return page(w, opt) }); err != nil {
		return err
	}
	return code(exit)
}

// partPath is where a part goes: where --json says, else to standard output.
func (a *app) partPath() string {
	if a.opt.json == "" {
		return "-"
	}
	return a.opt.json
}

// savePart writes a part of a study. One that is not finished is written too, and says so.
func (a *app) savePart(ctx context.Context, src *source, stopped error, write func(io.Writer) error) error {
	var files outputs
	files.add(a.partPath(), write)
	if err := files.check(src.path); err != nil {
		return err
	}
	if err := files.save(a.Out); err != nil {
		return err
	}
	if stopped == nil {
		return nil
	}
	_, why, exit := halted(ctx, stopped)
	return &Exit{Code: exit, Err: errors.New("this part is not finished: " + why)}
}
