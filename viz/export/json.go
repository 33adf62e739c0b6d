package export

import (
	"bufio"
	"bytes"
	"encoding"
	"encoding/json"
	"io"
	"math"
	"reflect"
	"slices"
	"strconv"
	"strings"
)

// JSON writes v as indented JSON. It follows the json tags of v, with three differences from encoding/json: NaN and infinities are written null,
// nil slices and maps are written empty, and lists of plain values stand on one line. Keys of maps are sorted.
func JSON(w io.Writer, v any) error {
	b := bufio.NewWriterSize(w, 1<<16)
	e := encoder{w: b, known: map[reflect.Type]*kind{}}
	if err := e.value(reflect.ValueOf(v), 0); err != nil {
		return err
	}
	b.WriteByte('\n')
	return b.Flush()
}

type encoder struct {
	w     *bufio.Writer
	known map[reflect.Type]*kind
	room  []byte // for a number
}

// kind is what is found out once about a type.
type kind struct {
	marshals, texts bool     // it writes itself
	flat            bool     // a list of it stands on one line
	members         []member // of a struct
}

// member is a field of a struct, by the way to it through those that it is embedded in.
type member struct {
	way                []int
	name               []byte // as it is written, with its colon
	leaveEmpty, leave0 bool
}

var (
	marshaler     = reflect.TypeFor[json.Marshaler]()
	textMarshaler = reflect.TypeFor[encoding.TextMarshaler]()
)

func (e *encoder) kindOf(t reflect.Type) *kind {
	k := e.known[t]
	if k == nil {
		k = &kind{marshals: t.Implements(marshaler), texts: t.Implements(textMarshaler), flat: plain(t)}
		if t.Kind() == reflect.Struct {
			k.members = members(t, nil)
		}
		e.known[t] = k
	}
	return k
}

// members lists the fields of a struct, those of embedded ones in their place.
func members(t reflect.Type, way []int) (all []member) {
	for i := range t.NumField() {
		sf := t.Field(i)
		name, options, _ := strings.Cut(sf.Tag.Get("json"), ",")
		here := append(slices.Clone(way), i)
		switch {
		case sf.Tag.Get("json") == "-" || !sf.IsExported() && !sf.Anonymous:
			continue
		case sf.Anonymous && name == "" && sf.Type.Kind() == reflect.Struct:
			all = append(all, members(sf.Type, here)...)
			continue
		case name == "":
			name = sf.Name
		}
		all = append(all, member{here, append(quoted(name), ": "...), strings.Contains(options, "omitempty"), strings.Contains(options, "omitzero")})
	}
	return all
}

func (e *encoder) line(depth int) {
	e.w.WriteByte('\n')
	for range depth {
		e.w.WriteString("  ")
	}
}

func quoted(s string) []byte {
	b, _ := json.Marshal(strings.ToValidUTF8(s, "\uFFFD")) // a text can always be written
	return b
}

// text writes a text; most have nothing in them to be written otherwise.
func (e *encoder) text(s string) {
	for i := range len(s) {
		if c := s[i]; c < ' ' || c > '~' || c == '"' || c == '\\' || c == '<' || c == '>' || c == '&' {
			e.w.Write(quoted(s))
			return
		}
	}
	e.w.WriteByte('"')
	e.w.WriteString(s)
	e.w.WriteByte('"')
}

// number writes f as encoding/json does, except that what is not finite is null and there is one zero.
func (e *encoder) number(f float64) {
	if math.IsNaN(f) || math.IsInf(f, 0) {
		e.w.WriteString("null")
		return
	}
	if f == 0 {
		f = 0
	}
	form := byte('f')
	if size := math.Abs(f); size != 0 && (size < 1e-6 || size >= 1e21) {
		form = 'e'
	}
	b := strconv.AppendFloat(e.room[:0], f, form, -1, 64)
	if n := len(b); n >= 4 && b[n-4] == 'e' && b[n-3] == '-' && b[n-2] == '0' { // e-09 is written e-9
		b[n-2] = b[n-1]
		b = b[:n-1]
	}
	e.room = b
	e.w.Write(b)
}

func (e *encoder) value(v reflect.Value, depth int) error {
	if !v.IsValid() {
		e.w.WriteString("null")
		return nil
	}
	k := e.kindOf(v.Type())
	switch v.Kind() {
	case reflect.Pointer, reflect.Interface:
		if v.IsNil() {
			e.w.WriteString("null")
			return nil
		}
	}
	switch {
	case k.marshals && v.CanInterface():
		b, err := v.Interface().(json.Marshaler).MarshalJSON()
		e.w.Write(b)
		return err
	case k.texts && v.CanInterface():
		b, err := v.Interface().(encoding.TextMarshaler).MarshalText()
		if err == nil {
			e.text(string(b))
		}
		return err
	}
	switch v.Kind() {
	case reflect.Pointer, reflect.Interface:
		return e.value(v.Elem(), depth)
	case reflect.Bool:
		e.w.WriteString(strconv.FormatBool(v.Bool()))
	case reflect.String:
		e.text(v.String())
	case reflect.Float32, reflect.Float64:
		e.number(v.Float())
	case reflect.Int, reflect.Int8, reflect.Int16, reflect.Int32, reflect.Int64:
		e.w.WriteString(strconv.FormatInt(v.Int(), 10))
	case reflect.Uint, reflect.Uint8, reflect.Uint16, reflect.Uint32, reflect.Uint64:
		e.w.WriteString(strconv.FormatUint(v.Uint(), 10))
	case reflect.Struct:
		return e.fields(v, k.members, depth)
	case reflect.Map:
		return e.entries(v, depth)
	case reflect.Slice, reflect.Array:
		return e.list(v, depth)
	default:
		return &json.UnsupportedTypeError{Type: v.Type()}
	}
	return nil
}

func (e *encoder) list(v reflect.Value, depth int) error {
	e.w.WriteByte('[')
	flat := e.kindOf(v.Type().Elem()).flat
	for i := range v.Len() {
		if i > 0 {
			e.w.WriteByte(',')
		}
		if !flat {
			e.line(depth + 1)
		} else if i > 0 {
			e.w.WriteByte(' ')
		}
		if err := e.value(v.Index(i), depth+1); err != nil {
			return err
		}
	}
	if !flat && v.Len() > 0 {
		e.line(depth)
	}
	e.w.WriteByte(']')
	return nil
}

// plain reports whether values of t are written without a line of their own.
func plain(t reflect.Type) bool {
	if t.Kind() == reflect.Pointer {
		t = t.Elem()
	}
	return t.Kind() <= reflect.Float64 || t.Kind() == reflect.String
}

func (e *encoder) fields(v reflect.Value, all []member, depth int) error {
	e.w.WriteByte('{')
	n := 0
	for i := range all {
		m := &all[i]
		x := v.FieldByIndex(m.way)
		if m.leaveEmpty && empty(x) || m.leave0 && x.IsZero() {
			continue
		}
		e.next(&n, depth)
		e.w.Write(m.name)
		if err := e.value(x, depth+1); err != nil {
			return err
		}
	}
	e.close(n, depth)
	return nil
}

// entries writes a map, its keys sorted.
func (e *encoder) entries(v reflect.Value, depth int) error {
	type entry struct {
		key string
		val reflect.Value
	}
	all := make([]entry, 0, v.Len())
	for it := v.MapRange(); it.Next(); {
		key := it.Key().String()
		if it.Key().Kind() != reflect.String {
			b, _ := json.Marshal(it.Key().Interface())
			key = string(bytes.Trim(b, `"`))
		}
		all = append(all, entry{key, it.Value()})
	}
	slices.SortFunc(all, func(a, b entry) int { return strings.Compare(a.key, b.key) })
	e.w.WriteByte('{')
	n := 0
	for _, x := range all {
		e.next(&n, depth)
		e.text(x.key)
		e.w.WriteString(": ")
		if err := e.value(x.val, depth+1); err != nil {
			return err
		}
	}
	e.close(n, depth)
	return nil
}

// next begins a member, after the n before it.
func (e *encoder) next(n *int, depth int) {
	if *n > 0 {
		e.w.WriteByte(',')
	}
	*n++
	e.line(depth + 1)
}

func (e *encoder) close(n, depth int) {
	if n > 0 {
		e.line(depth)
	}
	e.w.WriteByte('}')
}

func empty(v reflect.Value) bool {
	switch v.Kind() {
	case reflect.Slice, reflect.Map, reflect.Array, reflect.String:
		return v.Len() == 0
	case reflect.Struct:
		return false
	}
	return v.IsZero()
}
