package cli

import (
	"context"
	"fmt"
	"strings"

	"github.com/spf13/pflag"

	"headfall/network"
	"headfall/network/study"
)

// doubtful are the flags of studies that weigh the doubts.
type doubtful struct {
	samples int
	seed    int64
}

func (d *doubtful) bind(f *pflag.FlagSet) {
	f.IntVar(&d.samples, "samples", study.DefaultSamples, "`COUNT` of samples of the doubts in each judgement; 0 for none")
	f.Int64Var(&d.seed, "seed", study.DefaultSeed, "`NUMBER` where the draws begin; the same seed gives the same samples")
}

// weigh makes the options of a study.
func (a *app) weigh(d doubtful, bar *progress) (study.Options, error) {
	opt := a.opt.study()
	opt.Samples, opt.Seed, opt.Progress = d.samples, d.seed, bar.done
	switch {
	case d.samples < 0 || d.samples > mostSamples:
		return opt, bad("as --samples 200", "--samples must lie between 0 and %d", mostSamples)
	case d.samples == 0:
		opt.Samples = -1
	}
	return opt, nil
}

// readings reads the levels of a CSV file.
func (a *app) readings(ctx context.Context, path, plan string, plant *network.Plant) (*study.Readings, error) {
	if path == "" {
		return nil, bad("as --readings levels.csv, with the header time,T-1 [m]", "it needs --readings CSV")
	}
	if path == "-" && plan == "-" {
		return nil, bad("give one of them a name", "the plan and the readings cannot both come from standard input")
	}
	src, err := a.read(ctx, path)
	if err != nil {
		return nil, err
	}
	list, err := study.ReadReadings(strings.NewReader(string(src.data)), plant)
	if err != nil {
		return nil, &Exit{Code: ExitBad, Err: fmt.Errorf("%s: %s", src.name, strings.ReplaceAll(err.Error(), "\n", "\n  "))}
	}
	return list, nil
}
