package studies

import (
	"testing"

	"headfall/network/study"
)

// The bits of a judgement do not depend on the number of workers.
func TestJudgeSameBits(t *testing.T) {
	var first string
	for _, workers := range []int{1, 2, 5} {
		r := must(study.Judge(t.Context(), demo(t, "day_tank"), study.Options{Samples: 30, Workers: workers}))(t)
		if first == "" {
			first = bits(t, r)
		}
		same(t, "day_tank", bits(t, r), first)
	}
}
