package scenarios

import (
	"bytes"
	"encoding/json"
	"sort"
	"strings"

	"headfall/elements"
	"headfall/elements/quantity"
)

// object of JSON.
type jsonObject = map[string]any

// Schema returns a JSON Schema (draft-07) of the file format, for editors. It is written from the tables that files are read along.
func Schema() []byte {
	d := newDecoder(&source{})
	s := &schemaWriter{d: d, definitions: jsonObject{}}
	root := s.object(d.planFields())
	root["$schema"] = "http://json-schema.org/draft-07/schema#"
	root["title"] = "headfall plant file, version " + version
	for _, room := range elements.Rooms() {
		s.definitions[roomName(room)] = s.room(d, room)
	}
	s.definitions["condition"] = s.object(d.conditionFields(&bound{}))
	root["definitions"] = s.definitions
	var b bytes.Buffer
	enc := json.NewEncoder(&b)
	enc.SetEscapeHTML(false)
	enc.SetIndent("", "  ")
	if err := enc.Encode(root); err != nil {
		panic(err) // maps of strings always encode
	}
	return b.Bytes()
}

// schemaWriter turns fields into JSON Schema; things with a name are written once.
type schemaWriter struct {
	d           *decoder
	definitions jsonObject
}

func (s *schemaWriter) object(fields []field) jsonObject {
	properties := jsonObject{}
	var required []string
	for i := range fields {
		f := &fields[i]
		p := s.written(f.written)
		if f.help != "" {
			p["description"] = f.help
		}
		if f.written.style == aQuantity {
			p["examples"] = []string{s.d.usually(f.key, f.written.dim).example}
		}
		properties[f.key] = p
		if f.need == elements.Required {
			required = append(required, f.key)
		}
	}
	o := jsonObject{"type": "object", "properties": properties, "additionalProperties": false}
	if len(required) > 0 {
		sort.Strings(required)
		o["required"] = required
	}
	return o
}

func (s *schemaWriter) written(w *writing) jsonObject {
	if w.or == nil {
		return s.one(w)
	}
	var ways []any
	for ; w != nil; w = w.or {
		ways = append(ways, s.one(w))
	}
	return jsonObject{"anyOf": ways}
}

// one writes one way of writing a value.
func (s *schemaWriter) one(w *writing) jsonObject {
	switch w.style {
	case aQuantity:
		return s.quantity(w.dim)
	case aMoment:
		return jsonObject{"type": []string{"string", "integer"}, "pattern": quantity.Pattern(quantity.Time) + "|[0-9]:[0-9]", "examples": []string{"06:20", "+1d 06:30", "20 min"},
			"patternErrorMessage": `a time is a clock time, "06:20", or a duration from the start, 20 min`}
	case aDate:
		return jsonObject{"type": "string", "pattern": `^\s*[0-9]{4}-[0-9]{2}-[0-9]{2}[ T][0-9]{2}:[0-9]{2}`, "examples": []string{"2027-10-09 06:00"},
			"patternErrorMessage": "date and clock time, e.g. 2027-10-09 06:00"}
	case aWord:
		return jsonObject{"enum": wordValues(w.words)}
	case aYesNo:
		return jsonObject{"enum": []any{true, false, "yes", "no", "true", "false"}}
	case aKind:
		return ref(roomName(w.room))
	case anObject:
		if w.name == "" {
			return s.object(w.fields())
		}
		return s.named(w)
	case aTable:
		return s.table(w.cols)
	case aList:
		list := jsonObject{"type": []string{"array", "null"}, "items": s.written(w.item)}
		if w.least > 0 {
			list["type"], list["minItems"] = "array", w.least
		}
		return list
	case aMap:
		return jsonObject{"type": []string{"object", "null"}, "additionalProperties": s.written(w.item)}
	case aCondition:
		return conditionSchema(w.words)
	}
	return jsonObject{"type": []string{"string", "number"}}
}

// wordValues adds what readers of YAML make of words such as off.
func wordValues(words []string) []any {
	var all []any
	for _, w := range words {
		all = append(all, w)
		switch w {
		case "off", "no":
			all = append(all, false)
		case "on", "yes":
			all = append(all, true)
		case version:
			all = append(all, 1)
		}
	}
	return all
}

// conditionSchema is any condition; with words {level: …, above|below: …} or {after: …}.
func conditionSchema(words []string) jsonObject {
	condition := ref("condition")
	if len(words) == 0 || words[0] != "after" {
		return condition
	}
	after := jsonObject{"type": "object", "properties": jsonObject{"after": jsonObject{"type": "string"}}, "required": []string{"after"}, "additionalProperties": false}
	return jsonObject{"anyOf": []any{condition, after}}
}

func (s *schemaWriter) named(w *writing) jsonObject {
	fields := w.fields()
	name := w.name
	if s.definitions[name] == nil {
		s.definitions[name] = jsonObject{} // written now: it may contain itself
		o := s.object(fields)
		if w.unless != "" {
			o["anyOf"] = []any{jsonObject{"required": o["required"]}, jsonObject{"required": []string{w.unless}}}
			delete(o, "required")
		}
		s.definitions[name] = o
	}
	return ref(name)
}

func ref(name string) jsonObject {
	return jsonObject{"allOf": []any{jsonObject{"$ref": "#/definitions/" + name}}}
}

func roomName(room elements.Room) string { return "any_" + string(room) }

// quantity is a number with its unit, or a bare one where the dimension has none.
func (s *schemaWriter) quantity(dim quantity.Dim) jsonObject {
	name := "a_" + strings.ReplaceAll(dim.String(), " ", "_")
	if s.definitions[name] == nil {
		example := usualOf[dim].example
		o := jsonObject{"type": "string", "pattern": quantity.Pattern(dim), "patternErrorMessage": "a number with its unit is wanted, e.g. " + example}
		if dim.Bare() {
			o["type"], o["patternErrorMessage"] = []string{"number", "string"}, "a number is wanted, e.g. "+example
		}
		s.definitions[name] = o
	}
	return ref(name)
}

func (s *schemaWriter) table(cols []quantity.Dim) jsonObject {
	cells := make([]any, len(cols))
	for i, c := range cols {
		cells[i] = s.quantity(c)
		if c == quantity.Time {
			cells[i] = jsonObject{"type": []string{"string", "integer"}}
		}
	}
	row := jsonObject{"type": "array", "items": cells, "minItems": len(cols), "maxItems": len(cols)}
	return jsonObject{"type": "array", "items": row, "minItems": 1}
}

// room is any kind of a room: a mapping of one key, or a bare word where a kind needs nothing more.
func (s *schemaWriter) room(d *decoder, room elements.Room) jsonObject {
	properties := jsonObject{}
	var words []string
	for _, k := range elements.Kinds(room) {
		fields := d.params(k.New())
		d.what = k.Name
		p := s.object(fields)
		body := jsonObject{"anyOf": s.bodies(p, fields), "description": k.Doc}
		properties[k.Name] = body
		if p["required"] == nil {
			words = append(words, k.Name)
		}
	}
	ways := []any{jsonObject{"type": "object", "properties": properties, "additionalProperties": false, "minProperties": 1, "maxProperties": 1}}
	if room == elements.Trims {
		ways = append(ways, jsonObject{"type": "string"}) // also the file's own
	} else if len(words) > 0 {
		ways = append(ways, jsonObject{"enum": words})
	}
	return jsonObject{"anyOf": ways}
}

// bodies are the ways to write the parameters of a kind: all of them, or one alone where one is enough.
func (s *schemaWriter) bodies(all jsonObject, fields []field) []any {
	ways := []any{all, jsonObject{"type": "null"}}
	for _, as := range []form{scalar, list} {
		for j := range fields {
			if takes(fields[j].written, as) {
				ways = append(ways, s.written(fields[j].written))
				break
			}
		}
	}
	return ways
}
