package cli

import (
	"io"

	"headfall/elements"
	"headfall/viz/export"
)

// kindsJSON writes them for other programs.
func (a *app) kindsJSON(kinds []*elements.Kind) error {
	type param struct {
		Key     string `json:"key"`
		Written string `json:"written"`
		Need    string `json:"need"`
		Help    string `json:"help"`
	}
	type kind struct {
		Name   string  `json:"name"`
		Room   string  `json:"room"`
		Doc    string  `json:"doc"`
		Law    string  `json:"law"`
		Valid  string  `json:"valid"`
		Source string  `json:"source"`
		Sample string  `json:"sample"`
		Params []param `json:"parameters"`
	}
	answer := struct {
		Schema  int    `json:"schema"`
		Command string `json:"command"`
		Kinds   []kind `json:"kinds"`
	}{1, "kinds", nil}
	for _, k := range kinds {
		one := kind{k.Name, string(k.Room), k.Doc, k.Law, k.Valid, k.Source, k.Sample, nil}
		for _, p := range paramsOf(k) {
			one.Params = append(one.Params, param{p.Key, written(p), need(p), p.Help})
		}
		answer.Kinds = append(answer.Kinds, one)
	}
	return a.only(a.opt.json, func(w io.Writer) error { return export.JSON(w, answer) })
}
