package cli

import (
	"path"
	"regexp"
	"strings"
	"testing"

	"headfall/elements/quantity"
	"headfall/scenarios"
)

func topicText(t *testing.T, name string) string {
	t.Helper()
	data, err := topics.ReadFile(path.Join("topics", name+".txt"))
	if err != nil {
		t.Fatal(err)
	}
	return string(data)
}

// No topic promises what nobody can know, or speaks of the inside of the program.
func TestTopicsSpeakTheTrade(t *testing.T) {
	for _, name := range []string{"conditions", "doubts", "exit-codes", "files", "names", "units"} {
		if word := refused.FindString(topicText(t, name)); word != "" {
			t.Errorf("%s says %q", name, word)
		}
	}
}

var sample = regexp.MustCompile(`(?m)^  (\{.*\})(?:   ?.*)?$`)

// Every condition, limit and step that the help shows is understood, put into the plant that new writes (with a roof and a high point).
func TestConditionsOfTheHelpLoad(t *testing.T) {
	found := sample.FindAllStringSubmatch(topicText(t, "conditions"), -1)
	if len(found) < 20 {
		t.Fatalf("%d samples", len(found))
	}
	plant := replaced(t, string(scenarios.Starter()), "    level: 3.20 m ", "    cover: {gas: {pressure: 0 mbar(g), temperature: 12 °C}}\n    level: 3.20 m ")
	plant = replaced(t, plant, "      - fittings:", "      - high_point: {elevation: 4 m}\n      - fittings:")
	for _, m := range found {
		under := "limits: "
		if m[1] == "{emptied: T-1}" { // a condition of steps; a limit says by when
			m[1] = "{id: x, when: {emptied: T-1}, valve: V-1, to: 0 %}"
		}
		if strings.HasPrefix(m[1], "{id:") {
			under = "steps: "
		}
		text := replaced(t, plant, "\n"+under, "\n"+under+"#\n  - "+m[1]+"\n#")
		p, err := scenarios.Load("plant.yaml", []byte(text), scenarios.Options{})
		if err != nil {
			t.Errorf("%s: %v", m[1], err)
			continue
		}
		if faults, _ := p.Validate(); len(faults) > 0 {
			t.Errorf("%s: %v", m[1], scenarios.Locate(p, faults))
		}
	}
}

func replaced(t *testing.T, text, old, by string) string {
	t.Helper()
	if strings.Count(text, old) != 1 {
		t.Fatalf("%q stands %d times in the plant", old, strings.Count(text, old))
	}
	return strings.Replace(text, old, by, 1)
}

// The doubts that the help shows are understood.
func TestDoubtsOfTheHelpParse(t *testing.T) {
	for text, dim := range map[string]quantity.Dim{"4.2 m ± 0.05 m": quantity.Length, "0.62 ± 4 %": quantity.Number, "0.58 to 0.66": quantity.Number} {
		if !strings.Contains(topicText(t, "doubts"), text) {
			t.Errorf("the help does not show %q", text)
		}
		if v, err := quantity.Parse(text, dim); err != nil || v.Doubt.Kind == 0 {
			t.Errorf("%q: %v %v", text, v, err)
		}
	}
}
