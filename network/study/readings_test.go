package study_test

import (
	"math"
	"strings"
	"testing"

	"headfall/network/study"
)

func TestReadReadings(t *testing.T) {
	for name, c := range map[string]struct {
		csv   string
		time  float64
		level float64
	}{
		"clock":             {"time,T-1 [m]\n06:20,2.10", 1200, 2.1},
		"clock, next day":   {"time,T-1 [m]\n+1d 00:10,0.2", 18*3600 + 600, 0.2},
		"date":              {"time,T-1 [mm]\n2027-03-02 06:20:30,2100", 1230, 2.1},
		"duration":          {"Time , T-1 [cm]\n1 h 5 min, 210", 3900, 2.1},
		"bare minutes":      {"time [min],T-1 [m]\n20,2.10", 1200, 2.1},
		"gauge by its tag":  {"time,LT-1 [%]\n06:20,50", 1200, 0.1 + 0.5*2.8},
		"gauge, no unit":    {"time,LT-1\n06:20,50 %", 1200, 1.5},
		"vessel in percent": {"time,T-1 [%]\n06:20,50", 1200, 1.5},
		"gauge in metres":   {"time,LT-1 [m]\n06:20,1.4", 1200, 1.5},
		"own unit":          {"time,T-1 [m]\n06:20,2100 mm", 1200, 2.1},
		"volume":            {"time,T-1 [m3]\n06:20,3.14159265", 1200, 1},
		"semicolons":        {"time;T-1 [m]\n06:20;2.10", 1200, 2.1},
		"words, blanks":     {"\ufeff# by hand\ntime,T-1 [m]\n06:10,\n06:15,-\n06:20, 2.10", 1200, 2.1},
	} {
		r := reads(t, loads(bench), c.csv)
		if n := len(r.List); n != 1 {
			t.Errorf("%s: %d readings", name, n)
			continue
		}
		if x := r.List[0]; math.Abs(x.Time-c.time) > 1e-6 || math.Abs(x.Level-c.level) > 1e-6 {
			t.Errorf("%s: %g s, %g m; want %g s, %g m", name, x.Time, x.Level, c.time, c.level)
		}
	}
}

// FuzzReadReadings: no file makes it panic, and what is read is in the order of time.
func FuzzReadReadings(f *testing.F) {
	plant, err := loads(bench)()
	if err != nil {
		f.Fatal(err)
	}
	for _, s := range []string{"time,T-1 [m]\n06:20,2.10", "time [min];LT-1\n+1d 00:10;50 %", "\ufeff# x\ntime,T-1 [m3]\n1 h 2 min,\"3\"", "time,T-1 [m]\n\"", ",\n,,"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		r, err := study.ReadReadings(strings.NewReader(s), plant)
		if err != nil {
			return
		}
		for i := 1; i < len(r.List); i++ {
			if r.List[i].Time < r.List[i-1].Time || math.IsNaN(r.List[i].Level) {
				t.Fatalf("%q: %+v", s, r.List)
			}
		}
	})
}

func TestReadReadingsFaults(t *testing.T) {
	plant, err := loads(bench)()
	if err != nil {
		t.Fatal(err)
	}
	for csv, want := range map[string]string{
		"":                              "holds no header",
		"time,T-1 [m]\n":                "holds no readings",
		"when,T-1 [m]\n1,2":             "begins with time",
		"time,T-2 [m]\n06:20,2":         `no vessel or gauge "T-2"; there are T-1, LT-1`,
		"time,T-1\n06:20,2":             "write T-1 [m]",
		"time,T-1 [s]\n06:20,2":         "T-1 [s]",
		"time,T-1 [m]\n6.20,2":          "row 2",
		"time,T-1 [m]\n06:20,2,3":       "3 fields",
		"time,T-1 [m]\n06:20,high":      "row 2: T-1",
		"time,T-1 [m],LT-1 [%]\n0 s,,1": "two columns",
	} {
		_, err := study.ReadReadings(strings.NewReader(csv), plant)
		if err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%q: %v, want %q", csv, err, want)
		}
	}
}
