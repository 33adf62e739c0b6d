package study

import (
	"sort"

	"headfall/network"
)

// levelAt returns the level of a vessel at time t, m above base, from a run's series: straight between samples, and after anything that acted
// from then on.
func levelAt(s *network.Series, tag string, t float64) float64 {
	return courseAt(s.Time, s.Level[tag], t)
}

// courseAt interpolates values over times, which do not fall; of two values at one time the later counts.
func courseAt(times, values []float64, t float64) float64 {
	n := len(times)
	i := sort.Search(n, func(k int) bool { return times[k] > t }) // first after t
	switch {
	case n == 0:
		return 0
	case i == 0:
		return values[0]
	case i == n:
		return values[n-1]
	}
	a, b := times[i-1], times[i]
	return values[i-1] + (values[i]-values[i-1])*(t-a)/(b-a)
}

const samplesOfCourse = 1000 // of a run that is compared with readings: straight lines between them are right to a millionth of the fall

// until makes a plant that is run to time t, with a series fine enough to read levels off.
func until(load Load, t float64) Load {
	return func() (*network.Plant, error) {
		p, err := load()
		if err != nil {
			return nil, err
		}
		p.RunFor = t * (1 + 1e-9)
		p.ReportEvery = t / samplesOfCourse
		return p, nil
	}
}
