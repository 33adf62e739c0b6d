package cli

import (
	"context"
	"errors"
	"io"

	"headfall/cmd/internal/text"
	"headfall/network"
)

// open reads a plant file and gives what makes a plant of it for every worker; a fault of the file ends with code 2, before anything is computed.
func (a *app) open(ctx context.Context, path string) (*source, func() (*network.Plant, error), error) {
	src, err := a.read(ctx, path)
	if err != nil {
		return nil, nil, err
	}
	load := func() (*network.Plant, error) { return a.load(src, &a.opt) }
	_, err = load()
	return src, load, err
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
	opt := text.Options{Width: a.Width, Colour: a.colour() && !files.toOut(), Quiet: a.opt.quiet}
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
