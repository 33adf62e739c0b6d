package cli

import (
	"bytes"
	"context"
	"errors"
	"strings"
	"testing"

	"headfall/network"
)

// fake is a program with a quick engine: a plant of one vessel and an answer by hand.
type fake struct {
	app
	out, err bytes.Buffer
	env      map[string]string
}

func newFake(t *testing.T) *fake {
	t.Chdir(t.TempDir())
	f := &fake{env: map[string]string{}}
	f.Streams = &Streams{In: strings.NewReader("from standard input\n"), Out: &f.out, Err: &f.err, Env: func(k string) string { return f.env[k] }}
	f.engine = &engine{
		load: func(src *source, _ *options) (*network.Plant, error) {
			if strings.Contains(string(src.data), "fault") {
				return nil, &Exit{Code: ExitBad, Err: errors.New("a fault")}
			}
			return &network.Plant{Title: src.name, Vessels: []*network.Vessel{{Tag: "T-1"}}}, nil
		},
		judge: func(context.Context, func() (*network.Plant, error), *options, func(float64)) (*network.Result, error) {
			return answerOf(network.Run, ExitHolds), nil
		},
	}
	return f
}

func answerOf(v network.Verdict, code int) *network.Result {
	return &network.Result{
		Schema: 1, Command: "run", Verdict: v, ExitCode: code, Complete: true, Series: &network.Series{},
		Vessels: map[string]*network.VesselResult{"T-1": {StartLevel: 1, PeakLevel: 1}},
	}
}

// gives runs a command line and wants an exit code.
func (f *fake) gives(t *testing.T, code int, args ...string) {
	t.Helper()
	f.opt = options{}
	if got := f.main(t.Context(), args); got != code {
		t.Fatalf("%q ended with %d, want %d\n%s%s", args, got, code, f.out.String(), f.err.String())
	}
}
