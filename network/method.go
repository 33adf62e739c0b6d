package network

import (
	"fmt"
	"strings"

	"headfall/integrate"
)

// auto is the method that suits the plant; see system.method.
const auto = "auto"

// tight is the tolerance under which the higher order pays.
const tight = 1e-8

// method chooses for the plant. Where steps are set by kinks and reversals, as they are at the usual tolerances, Rodas4P2 needs no more of them than
// Rodas5P, errs less, and has two stages less. Next to quick unknowns, gas and columns, Rodas5P is the quieter.
func (s *system) method() integrate.Method {
	if s.rtol < tight || len(s.inertial) > 0 || s.teeRow > len(s.stations) {
		return integrate.Rodas5P
	}
	return integrate.Rodas4P2
}

// methodNamed finds a method by its name; empty or auto leaves the choice to the plant.
func (s *system) methodNamed(name string) (integrate.Method, error) {
	if name == "" || name == auto {
		return s.method(), nil
	}
	names := []string{auto}
	for _, m := range integrate.Methods() {
		if strings.EqualFold(m.Name(), name) {
			return m, nil
		}
		names = append(names, strings.ToLower(m.Name()))
	}
	return nil, fmt.Errorf("there is no method %q; there are %s", name, strings.Join(names, ", "))
}
