package cli

import (
	"runtime"
	"slices"
	"strings"
	"time"

	"github.com/spf13/cobra"

	"headfall/elements/quantity"
)

// options are shared by all commands.
type options struct {
	json      string
	set       []string
	caseName  string
	quiet     bool
	color     string
	method    string
	tolerance float64
	workers   int
	timeout   string
	maxSteps  int

	limit time.Duration // timeout, understood; 0 none
}

const mostWorkers = 1024 // each holds a plant of its own

var (
	methods = []string{"auto", "rodas4p2", "rodas5p", "rodas4p", "bdf"}
	colors  = []string{"auto", "always", "never"}
)

func (o *options) bind(root *cobra.Command) {
	f := root.PersistentFlags()
	f.SortFlags = false
	f.StringVar(&o.json, "json", "", "write the answer as JSON to `PATH` (- for standard output)")
	f.StringArrayVar(&o.set, "set", nil, "change a number of the file: `TAG.x=VALUE`, as V-1.kv=80; may be repeated")
	f.StringVar(&o.caseName, "case", "", "apply the case `NAME` of the file")
	f.BoolVarP(&o.quiet, "quiet", "q", false, "the first line only, no progress")
	f.StringVar(&o.color, "color", "auto", "`WHEN` to paint: auto, always or never; NO_COLOR is honoured")
	f.StringVar(&o.method, "method", methods[0], "`WAY` of calculating, auto as it suits the plant: "+strings.Join(methods, ", "))
	f.Float64Var(&o.tolerance, "tolerance", 0, "relative accuracy of the calculation, a `SHARE`; 0 takes the default")
	f.IntVar(&o.workers, "workers", 0, "`COUNT` of calculations side by side; 0 takes one a processor")
	f.StringVar(&o.timeout, "timeout", "", "give up after this `TIME`: 90s, 5 min")
	f.IntVar(&o.maxSteps, "max-steps", 0, "end a calculation after this `COUNT` of steps; 0 takes a million")
	root.PersistentPreRunE = func(*cobra.Command, []string) error { return o.check() }
}

// check refuses values that make no sense.
func (o *options) check() error {
	switch {
	case !slices.Contains(methods, o.method):
		return bad(among(o.method, methods), "--method %s is not known", o.method)
	case !slices.Contains(colors, o.color):
		return bad(among(o.color, colors), "--color %s is not known", o.color)
	case !(o.tolerance == 0 || o.tolerance >= 1e-12 && o.tolerance <= 0.1):
		return bad("as --tolerance 1e-6", "--tolerance must lie between 1e-12 and 0.1")
	case o.maxSteps < 0:
		return bad("as --max-steps 100000", "--max-steps must not be negative")
	case o.workers < 0 || o.workers > mostWorkers:
		return bad("as --workers 2", "--workers must lie between 0 and %d", mostWorkers)
	}
	if o.workers == 0 {
		o.workers = runtime.GOMAXPROCS(0)
	}
	if o.timeout == "" {
		return nil
	}
	v, err := quantity.ParseTime(o.timeout)
	if err != nil || v.SI <= 0 {
		return bad("as --timeout 90s or --timeout '5 min'", "--timeout %q is not a length of time", o.timeout)
	}
	o.limit = time.Duration(v.SI * float64(time.Second))
	return nil
}

// among says what there is to choose from, the likely one first.
func among(word string, words []string) string {
	if near := nearest(word, words); near != "" {
		return "did you mean " + near + "?"
	}
	return "one of " + strings.Join(words, ", ")
}

// colour tells whether to paint what goes to the terminal.
func (a *app) colour() bool {
	switch a.opt.color {
	case "always":
		return true
	case "never":
		return false
	}
	return a.OutTerm && a.Env("NO_COLOR") == "" && a.Env("TERM") != "dumb"
}
