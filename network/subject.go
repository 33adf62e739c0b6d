package network

import "headfall/elements/quantity"

// subjects are the words of the file format, with what they are measured in.
var subjects = [...]struct {
	word, unit string
	dim        quantity.Dim
}{
	Level:      {"level", "m", quantity.Length},
	Flow:       {"flow", "m3/s", quantity.Flow},
	Velocity:   {"velocity", "m/s", quantity.Velocity},
	Pressure:   {"pressure", "Pa", quantity.Pressure},
	CrestHead:  {"crest", "m", quantity.Length},
	Opening:    {"opening", "1", quantity.Ratio},
	Difference: {"difference", "m", quantity.Length},
	Rising:     {"rising", "m/s", quantity.Velocity},
	Falling:    {"falling", "m/s", quantity.Velocity},
	Passed:     {"passed", "m3", quantity.Volume},
	Backflow:   {"backflow", "m3", quantity.Volume},
	Spilled:    {"spilled", "m3", quantity.Volume},
	Starts:     {"starts", "1", quantity.Count},
	Emptied:    {"emptied", "s", quantity.Time},
}

// String returns the word of the file format.
func (s Subject) String() string { return subjects[s].word }

// Unit returns the SI unit that the subject is measured in.
func (s Subject) Unit() string { return subjects[s].unit }

// Dim returns the dimension of the subject.
func (s Subject) Dim() quantity.Dim { return subjects[s].dim }

// SubjectNamed returns the subject of a word.
func SubjectNamed(word string) (Subject, bool) {
	for i := range subjects {
		if subjects[i].word == word {
			return Subject(i), true
		}
	}
	return 0, false
}
