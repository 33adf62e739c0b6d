package cli

import (
	"fmt"
	"strconv"

	"github.com/spf13/pflag"

	"headfall/network/study"
)

// many are the flags of studies made of many cases.
type many struct {
	shard, html string
	all         bool // of a drill: print every rehearsal that fails
}

func (m *many) bind(f *pflag.FlagSet) {
	f.StringVar(&m.html, "html", "", "also write the report of the plan, with this study in it, to `PATH`")
	f.StringVar(&m.shard, "shard", "", "do part `I/N` only, as 2/8 or auto/8 in a job array, and write it for merge")
}

// common are the options that such studies share.
func (a *app) common(m many, bar *progress) (study.Common, error) {
	c := a.opt.calculation()
	common := study.Common{Set: a.opt.set, Workers: a.opt.workers, Method: c.Method, Tolerance: c.Tolerance, MaxSteps: c.MaxSteps, Progress: bar.done}
	if m.shard == "" {
		return common, nil
	}
	var err error
	if common.Shard, err = study.ParseShard(m.shard, a.arrayIndex); err != nil {
		return common, bad("as --shard 2/8", "--shard: %w", err)
	}
	return common, nil
}

// arrayIndex is this job's place in a job array, from 1, as the batch engine says it.
func (a *app) arrayIndex() (int, error) {
	for _, engine := range []struct{ index, first string }{
		{"JOB_COMPLETION_INDEX", ""}, // Kubernetes indexed jobs, from 0
		{"SLURM_ARRAY_TASK_ID", "SLURM_ARRAY_TASK_MIN"},
		{"AWS_BATCH_JOB_ARRAY_INDEX", ""}, // from 0
	} {
		text := a.Env(engine.index)
		if text == "" {
			continue
		}
		i, err := strconv.Atoi(text)
		first := 0
		if engine.first != "" && err == nil {
			first = 1
			if low := a.Env(engine.first); low != "" {
				first, err = strconv.Atoi(low)
			}
		}
		if err != nil {
			return 0, fmt.Errorf("%s is %q, which is no number", engine.index, text)
		}
		return i - first + 1, nil
	}
	return 0, fmt.Errorf("auto needs a job array, and there is no JOB_COMPLETION_INDEX, SLURM_ARRAY_TASK_ID or AWS_BATCH_JOB_ARRAY_INDEX here")
}
