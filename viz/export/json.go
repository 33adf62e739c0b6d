package export

import (
	"bufio"
	"encoding"
	"encoding/json"
	"io"
	"math"
	"reflect"
	"sort"
	"strconv"
	"strings"
)

// JSON writes v as indented JSON. It follows the json tags of v, with three differences from encoding/json: NaN and infinities are written null,
// nil slices and maps are written empty, and lists of plain values stand on one line. Keys of maps are sorted.
func JSON(w io.Writer, v any) error {
	b := bufio.NewWriter(w)
	e := encoder{w: b}
	if err := e.value(reflect.ValueOf(v), 0); err != nil {
		return err
	}
	b.WriteByte('\n')
	return b.Flush()
}

type encoder struct{ w *bufio.Writer }

func (e *encoder) line(depth int) {
	e.w.WriteByte('\n')
	for range depth {
		e.w.WriteString("  ")
	}
}

func (e *encoder) text(s string) error {
	b, err := json.Marshal(strings.ToValidUTF8(s, "\uFFFD"))
	e.w.Write(b)
	return err
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
	b, _ := json.Marshal(f)
	e.w.Write(b)
}

func (e *encoder) value(v reflect.Value, depth int) error {
	if !v.IsValid() {
		e.w.WriteString("null")
		return nil
	}
	switch v.Kind() {
	case reflect.Pointer, reflect.Interface:
		if v.IsNil() {
			e.w.WriteString("null")
			return nil
		}
	}
	if v.CanInterface() {
		switch x := v.Interface().(type) {
		case json.Marshaler:
			b, err := x.MarshalJSON()
			e.w.Write(b)
			return err
		case encoding.TextMarshaler:
			b, err := x.MarshalText()
			if err != nil {
				return err
			}
			return e.text(string(b))
		}
	}
	switch v.Kind() {
	case reflect.Pointer, reflect.Interface:
		return e.value(v.Elem(), depth)
	case reflect.Bool:
		e.w.WriteString(strconv.FormatBool(v.Bool()))
	case reflect.String:
		return e.text(v.String())
	case reflect.Float32, reflect.Float64:
		e.number(v.Float())
	case reflect.Int, reflect.Int8, reflect.Int16, reflect.Int32, reflect.Int64:
		e.w.WriteString(strconv.FormatInt(v.Int(), 10))
	case reflect.Uint, reflect.Uint8, reflect.Uint16, reflect.Uint32, reflect.Uint64:
		e.w.WriteString(strconv.FormatUint(v.Uint(), 10))
	case reflect.Struct:
		return e.fields(structFields(v), depth)
	case reflect.Map:
		return e.fields(mapFields(v), depth)
	case reflect.Slice, reflect.Array:
		return e.list(v, depth)
	default:
		return &json.UnsupportedTypeError{Type: v.Type()}
	}
	return nil
}

func (e *encoder) list(v reflect.Value, depth int) error {
	e.w.WriteByte('[')
	flat := plain(v.Type().Elem())
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

type field struct {
	key string
	val reflect.Value
}

func (e *encoder) fields(all []field, depth int) error {
	e.w.WriteByte('{')
	for i, f := range all {
		if i > 0 {
			e.w.WriteByte(',')
		}
		e.line(depth + 1)
		if err := e.text(f.key); err != nil {
			return err
		}
		e.w.WriteString(": ")
		if err := e.value(f.val, depth+1); err != nil {
			return err
		}
	}
	if len(all) > 0 {
		e.line(depth)
	}
	e.w.WriteByte('}')
	return nil
}

func structFields(v reflect.Value) []field {
	var all []field
	t := v.Type()
	for i := range t.NumField() {
		sf := t.Field(i)
		tag := sf.Tag.Get("json")
		name, options, _ := strings.Cut(tag, ",")
		if tag == "-" || !sf.IsExported() && !sf.Anonymous {
			continue
		}
		if sf.Anonymous && name == "" && sf.Type.Kind() == reflect.Struct {
			all = append(all, structFields(v.Field(i))...)
			continue
		}
		if strings.Contains(options, "omitempty") && empty(v.Field(i)) || strings.Contains(options, "omitzero") && v.Field(i).IsZero() {
			continue
		}
		if name == "" {
			name = sf.Name
		}
		all = append(all, field{name, v.Field(i)})
	}
	return all
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

func mapFields(v reflect.Value) []field {
	var all []field
	for it := v.MapRange(); it.Next(); {
		k := it.Key()
		key := k.String()
		if k.Kind() != reflect.String {
			b, _ := json.Marshal(k.Interface())
			key = strings.Trim(string(b), `"`)
		}
		all = append(all, field{key, it.Value()})
	}
	sort.Slice(all, func(i, j int) bool { return all[i].key < all[j].key })
	return all
}
