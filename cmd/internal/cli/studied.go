package cli

import (
	"context"
	"io"

	"headfall/network"
	"headfall/viz"
)

// studied is the report of a plan with a study in it.
type studied struct {
	path string
	page viz.Page
}

// report makes ready to write the report that --html asks for; nil when it asks for none.
func (a *app) report(m many, load func() (*network.Plant, error)) (*studied, error) {
	if m.html == "" {
		return nil, nil
	}
	if m.shard != "" {
		return nil, bad("write it of the whole study: leave out --shard", "--html and --shard do not go together")
	}
	plant, err := load()
	return &studied{path: m.html, page: viz.Page{Plant: plant}}, err
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
		s.page.Result, err = a.answer(ctx, src)
	}
	return err
}
