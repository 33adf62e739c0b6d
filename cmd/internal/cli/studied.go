package cli

import (
	"context"
	"io"

	"headfall/cmd/internal/text"
	"headfall/network"
	"headfall/network/study"
	"headfall/viz"
	"headfall/viz/export"
)

// cases is a study made of many cases: the whole of it, or one part of that.
type cases[H, U any] struct {
	command string
	many
	shard     study.Shard
	bar       *progress
	calculate func(context.Context) (*study.Part[H, U], error)
	join      func(*study.Part[H, U]) *study.Merged
}

// conclude calculates the cases, writes the answer and prints its page; a part of a study is only written.
func (s *cases[H, U]) conclude(ctx context.Context, a *app, p *opened) error {
	rep, err := a.report(s.many, p.plant)
	if err != nil {
		return err
	}
	var whole *study.Merged
	var files outputs
	rep.add(&files)
	if s.shard.Of == 0 {
		files.add(a.opt.json, func(w io.Writer) error { return export.JSON(w, whole.Answer()) })
	}
	if err := files.check(p.src.path); err != nil {
		return err
	}
	ctx, cancel := a.within(ctx)
	defer cancel()
	if err := rep.answer(ctx, a, p.src); err != nil { // first, so that it is there when the study is interrupted
		return err
	}
	part, err := s.calculate(ctx)
	s.bar.end()
	switch {
	case part == nil:
		return a.unfinished(ctx, err)
	case s.shard.Of > 0:
		return a.savePart(ctx, p.src, err, func(w io.Writer) error { return study.WritePart(w, s.command, part) })
	}
	whole = s.join(part)
	if err != nil {
		whole.Outcome().Halt(halted(ctx, err))
	}
	return a.tellWhole(files, rep, whole, s.all)
}

// tellWhole writes the files of a study of many cases and then its page.
func (a *app) tellWhole(files outputs, rep *studied, whole *study.Merged, all bool) error {
	if rep != nil {
		rep.page.Drill, rep.page.Spread = whole.Drill, whole.Spread
	}
	return a.tell(files, whole.Outcome().ExitCode, func(w io.Writer, opt text.Options) error {
		if whole.Spread != nil {
			return text.Spread(w, whole.Spread, opt)
		}
		opt.All = all
		return text.Drill(w, whole.Drill, opt)
	})
}

// studied is the report of a plan with a study in it.
type studied struct {
	path string
	page viz.Page
}

// report makes ready to write the report that --html asks for; nil when it asks for none.
func (a *app) report(m many, plant *network.Plant) (*studied, error) {
	if m.html == "" {
		return nil, nil
	}
	if m.shard != "" {
		return nil, bad("write it of the whole study: leave out --shard", "--html and --shard do not go together")
	}
	return &studied{path: m.html, page: viz.Page{Plant: plant}}, nil
}

// add enters the report among the files to be written.
func (s *studied) add(files *outputs) {
	if s != nil {
		files.add(s.path, func(w io.Writer) error { return viz.Write(w, s.page) })
	}
}

// answer judges the plan itself, as run does, for the page about it.
func (s *studied) answer(ctx context.Context, a *app, src *source) (err error) {
	if s != nil {
		s.page.Result, err = a.answer(ctx, src, s.page.Plant)
	}
	return err
}
