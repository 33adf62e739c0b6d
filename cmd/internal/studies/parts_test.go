package studies

import (
	"bytes"
	"context"
	"fmt"
	"strings"
	"testing"

	"headfall/network/study"
)

// wholeDrill and wholeSpread are what one run gives.
func wholeDrill(t *testing.T, load study.Load, workers int) string {
	opt := study.DrillOptions{}
	opt.Workers = workers
	return bits(t, study.DrillOf(must(study.Drill(t.Context(), load, opt))(t)))
}

func wholeSpread(t *testing.T, load study.Load, workers int) string {
	opt := study.SpreadOptions{Samples: 40}
	opt.Workers = workers
	return bits(t, study.SpreadOf(must(study.Spread(t.Context(), load, opt))(t)))
}

func TestStudiesSameBits(t *testing.T) {
	load := demo(t, "day_tank")
	drill, spread := wholeDrill(t, load, 1), wholeSpread(t, load, 1)
	for _, workers := range []int{2, 5} {
		same(t, "drill", wholeDrill(t, load, workers), drill)
		same(t, "spread", wholeSpread(t, load, workers), spread)
	}
}

// partsOf writes a study in n parts and reads them back.
func partsOf(t *testing.T, load study.Load, command string, n int, seed int64) (parts []*study.PartFile) {
	for i := 1; i <= n; i++ {
		parts = append(parts, partOf(t, t.Context(), load, command, study.Shard{Index: i, Of: n}, seed))
	}
	return parts
}

func partOf(t *testing.T, ctx context.Context, load study.Load, command string, shard study.Shard, seed int64) *study.PartFile {
	var b bytes.Buffer
	var err error
	switch command {
	case "drill":
		opt := study.DrillOptions{}
		opt.Shard = shard
		part, _ := study.Drill(ctx, load, opt)
		err = study.WritePart(&b, command, part)
	case "spread":
		opt := study.SpreadOptions{Samples: 40, Seed: seed}
		opt.Shard, opt.Progress = shard, progress(ctx)
		part, _ := study.Spread(ctx, load, opt)
		err = study.WritePart(&b, command, part)
	}
	if err != nil {
		t.Fatal(err)
	}
	return must(study.ReadPart(fmt.Sprintf("part-%d", shard.Index), &b))(t)
}

type stopKey struct{}

// progress calls what stops a context half-way, if it carries that.
func progress(ctx context.Context) func(float64) {
	stop, _ := ctx.Value(stopKey{}).(context.CancelFunc)
	return func(share float64) {
		if stop != nil && share > 0.4 {
			stop()
		}
	}
}

func TestMergeGivesTheWhole(t *testing.T) {
	load := demo(t, "day_tank")
	for _, n := range []int{1, 3} {
		m := must(study.Merge(partsOf(t, load, "drill", n, 0)))(t)
		same(t, "drill", bits(t, m.Drill), wholeDrill(t, load, 2))
		m = must(study.Merge(partsOf(t, load, "spread", n, 0)))(t)
		same(t, "spread", bits(t, m.Spread), wholeSpread(t, load, 2))
	}
}

func TestMergeRefuses(t *testing.T) {
	load := demo(t, "day_tank")
	parts := partsOf(t, load, "spread", 3, 0)
	other := partsOf(t, load, "spread", 3, 7)
	file := partOf(t, t.Context(), demo(t, "day_tank", "DAY-7.level=2.5 m"), "spread", study.Shard{Index: 2, Of: 3}, 0)
	ctx, stop := context.WithCancel(t.Context())
	half := partOf(t, context.WithValue(ctx, stopKey{}, stop), load, "spread", study.Shard{Index: 2, Of: 3}, 0)
	for _, c := range []struct {
		parts []*study.PartFile
		says  string
	}{
		{nil, "no part"},
		{parts[:2], "missing: 3"},
		{parts[1:2], "missing: 1, 3"},
		{[]*study.PartFile{parts[0], parts[0], parts[2]}, "given twice"},
		{[]*study.PartFile{parts[0], other[1], parts[2]}, "asked for in different ways"},
		{[]*study.PartFile{parts[0], file, parts[2]}, "different studies"},
		{[]*study.PartFile{parts[0], half, parts[2]}, "not finished"},
	} {
		if _, err := study.Merge(c.parts); err == nil || !strings.Contains(err.Error(), c.says) {
			t.Errorf("%s: %v", c.says, err)
		}
	}
	for _, text := range []string{"", "{}", "{\"schema\":1}\n", "hello\n"} {
		if _, err := study.ReadPart("x", strings.NewReader(text)); err == nil {
			t.Errorf("%q was read as a part", text)
		}
	}
}

// What was done before an interruption is kept and marked.
func TestInterruptedSpread(t *testing.T) {
	ctx, stop := context.WithCancel(t.Context())
	opt := study.SpreadOptions{Samples: 200}
	opt.Progress = func(share float64) {
		if share > 0.2 {
			stop()
		}
	}
	part, err := study.Spread(ctx, demo(t, "day_tank"), opt)
	if err == nil || part == nil {
		t.Fatalf("%v, %v", part, err)
	}
	r := study.SpreadOf(part)
	if r.Complete || r.Stopped != "interrupted" || r.Samples < 40 || r.Samples >= 200 {
		t.Errorf("complete %v, %s, %d samples", r.Complete, r.Stopped, r.Samples)
	}
}

// Damaged parts are refused, whatever they hold; nothing panics.
func FuzzParts(f *testing.F) {
	var b bytes.Buffer
	opt := study.SpreadOptions{Samples: 2}
	part, err := study.Spread(context.Background(), demo(f, "day_tank"), opt)
	if err != nil {
		f.Fatal(err)
	}
	if err := study.WritePart(&b, "spread", part); err != nil {
		f.Fatal(err)
	}
	f.Add(b.String())
	f.Add(strings.Replace(b.String(), `"drawn":[`, `"drawn":[0.5,`, 1))
	f.Add(strings.Replace(b.String(), `"unit":1`, `"unit":7`, 1))
	f.Add(strings.Replace(b.String(), `"unit":1`, `"unit":-1`, 1))
	f.Add(strings.Replace(b.String(), `"command":"spread"`, `"command":"drill"`, 1))
	f.Add(strings.Replace(b.String(), `"vessels":[`, `"vessels":["X",`, 1))
	f.Fuzz(func(t *testing.T, text string) {
		p, err := study.ReadPart("part", strings.NewReader(text))
		if err != nil {
			return
		}
		study.Merge([]*study.PartFile{p})
	})
}
