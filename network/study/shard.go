package study

import (
	"context"
	"fmt"
	"strconv"
	"strings"
)

// Shard is one of n parts of a study, from 1; the zero value is the whole. Shard i has the cases i-1, i-1+n, i-1+2n …, so that all take about as long.
type Shard struct{ Index, Of int }

// ParseShard reads "2/8"; auto stands for the index, and is asked for when the text says "auto/8".
func ParseShard(text string, auto func() (int, error)) (Shard, error) {
	i, n, both := strings.Cut(text, "/")
	of, err := strconv.Atoi(n)
	if !both || err != nil || of < 1 || of > mostParts {
		return Shard{}, fmt.Errorf("%q is not a part of a whole: write 2/8, or auto/8 in a job array", text)
	}
	var index int
	if i == "auto" {
		if index, err = auto(); err != nil {
			return Shard{}, err
		}
	} else if index, err = strconv.Atoi(i); err != nil {
		return Shard{}, fmt.Errorf("%q is not a part of a whole: write 2/8, or auto/8 in a job array", text)
	}
	if index < 1 || index > of {
		return Shard{}, fmt.Errorf("there is no part %d of %d; they count from 1", index, of)
	}
	return Shard{index, of}, nil
}

// whole tells that nothing is left out.
func (s Shard) whole() bool { return s.Of <= 1 }

// cases returns the numbers of the shard's cases among n.
func (s Shard) cases(n int) []int {
	first, step := 0, 1
	if !s.whole() {
		first, step = s.Index-1, s.Of
	}
	var list []int
	for i := first; i < n; i += step {
		list = append(list, i)
	}
	return list
}

// size returns how many of n cases are the shard's.
func (s Shard) size(n int) int {
	if s.whole() {
		return n
	}
	return (n - s.Index + s.Of) / s.Of
}

// Part is what one shard of a study gives back: its head, and those of its units that were done, by their number among all.
type Part[H, U any] struct {
	Head  H
	Shard Shard
	Count int // units of the whole study
	Units map[int]U
}

// complete tells that every unit of the shard was done.
func (p *Part[H, U]) complete() bool { return len(p.Units) == p.Shard.size(p.Count) }

// carry does the shard's share of n units.
func carry[H, U any](ctx context.Context, r *Runner, p *Part[H, U], unit func(ctx context.Context, b *Bench, i int) (U, error)) error {
	mine := p.Shard.cases(p.Count)
	out, done, err := Each(ctx, r, len(mine), func(ctx context.Context, b *Bench, k int) (U, error) { return unit(ctx, b, mine[k]) })
	p.Units = map[int]U{}
	for k, i := range mine {
		if done[k] {
			p.Units[i] = out[k]
		}
	}
	return err
}
