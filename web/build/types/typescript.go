package main

import (
	"encoding"
	"encoding/json"
	"fmt"
	"path"
	"reflect"
	"strconv"
	"strings"

	"weirmark/core/quantity"
)

// heading begins the written file.
const heading = "// Written by go run ./web/build/types from the types of core/message: change those.\n"

// ours begins the path of each package of the project.
const ours = "weirmark/"

var (
	jsonMarshaler = reflect.TypeFor[json.Marshaler]()
	textMarshaler = reflect.TypeFor[encoding.TextMarshaler]()
)

// written holds what types write that have a way of their own.
var written = map[reflect.Type]string{
	reflect.TypeFor[json.RawMessage]():  "unknown",
	reflect.TypeFor[[]byte]():           "string | null", // base64
	reflect.TypeFor[quantity.Number]():  "number | null",
	reflect.TypeFor[quantity.Written](): "number | null",
}

// typescript returns interfaces for the types of the values and for all that
// they contain, in the order of their first use. It fails on a type that JSON
// cannot hold or that writes itself, since its shape cannot be seen, and where
// two types would have one name.
func typescript(values []any) (string, error) {
	w := &writer{seen: map[reflect.Type]bool{}}
	for _, value := range values {
		t := reflect.TypeOf(value)
		if t == nil || t.Kind() != reflect.Struct || t.Name() == "" {
			return "", fmt.Errorf("%T is no named struct", value)
		}
		w.want(t)
	}
	// The first pass finds all types, the second one knows their names.
	if _, err := w.declarations(); err != nil {
		return "", err
	}
	if err := w.settleNames(reflect.TypeOf(values[0]).PkgPath()); err != nil {
		return "", err
	}
	text, err := w.declarations()
	return heading + text, err
}

// writer keeps which types are written, in order, and under which names.
type writer struct {
	seen  map[reflect.Type]bool
	types []reflect.Type
	names map[reflect.Type]string
}

// want has the type written once.
func (w *writer) want(t reflect.Type) {
	if !w.seen[t] {
		w.seen[t] = true
		w.types = append(w.types, t)
	}
}

// settleNames gives each type its own name; one of another package than home,
// where home has that name or two others share it, takes its package's before.
func (w *writer) settleNames(home string) error {
	count := map[string]int{}
	for _, t := range w.types {
		count[t.Name()]++
	}
	w.names = map[reflect.Type]string{}
	taken := map[string]reflect.Type{}
	for _, t := range w.types {
		name := t.Name()
		if count[name] > 1 && t.PkgPath() != home {
			from := path.Base(t.PkgPath())
			name = strings.ToUpper(from[:1]) + from[1:] + name
		}
		if other := taken[name]; other != nil {
			return fmt.Errorf("%s and %s would have the same name", other, t)
		}
		taken[name] = t
		w.names[t] = name
	}
	return nil
}

// declarations returns the text of all types; while it runs, types are added.
func (w *writer) declarations() (string, error) {
	var out strings.Builder
	for i := 0; i < len(w.types); i++ {
		text, err := w.declaration(w.types[i])
		if err != nil {
			return "", err
		}
		out.WriteString("\n" + text)
	}
	return out.String(), nil
}

func (w *writer) declaration(t reflect.Type) (string, error) {
	if t.Kind() != reflect.Struct {
		inner, err := w.shape(t)
		return fmt.Sprintf("export type %s = %s;\n", w.names[t], inner), err
	}
	fields, err := w.fields(t)
	return fmt.Sprintf("export interface %s {\n%s}\n", w.names[t], fields), err
}

// fields returns the lines of a struct, those of embedded structs among them.
func (w *writer) fields(t reflect.Type) (string, error) {
	var out strings.Builder
	for i := range t.NumField() {
		field := t.Field(i)
		name, options, _ := strings.Cut(field.Tag.Get("json"), ",")
		if name == "-" && options == "" {
			continue
		}
		if field.Anonymous && name == "" && field.Type.Kind() == reflect.Struct {
			inner, err := w.fields(field.Type)
			if err != nil {
				return "", err
			}
			out.WriteString(inner)
			continue
		}
		if !field.IsExported() {
			continue
		}
		if name == "" {
			name = field.Name
		}
		shape, err := w.reference(field.Type)
		if err != nil {
			return "", fmt.Errorf("%s.%s: %w", t, field.Name, err)
		}
		optional := ""
		for option := range strings.SplitSeq(options, ",") {
			switch option {
			case "omitempty", "omitzero":
				optional = "?"
			case "string":
				return "", fmt.Errorf("%s.%s: numbers as text are not foreseen", t, field.Name)
			}
		}
		if optional != "" {
			// A pointer or list that is left out never stands as null.
			shape = strings.TrimSuffix(shape, " | null")
		}
		fmt.Fprintf(&out, "  %s%s: %s;\n", property(name), optional, shape)
	}
	return out.String(), nil
}

// reference returns how a field names its type: our own types by name, those
// of Go and those without a name by their shape.
func (w *writer) reference(t reflect.Type) (string, error) {
	if t.Name() == "" || !strings.HasPrefix(t.PkgPath(), ours) || writes(t, jsonMarshaler) || writes(t, textMarshaler) {
		return w.shape(t)
	}
	w.want(t)
	return w.names[t], nil
}

// writes says whether values of the type write themselves by the interface.
func writes(t, by reflect.Type) bool {
	return t.Kind() != reflect.Pointer && (t.Implements(by) || reflect.PointerTo(t).Implements(by))
}

// shape returns the type as JSON shows it.
func (w *writer) shape(t reflect.Type) (string, error) {
	if known, listed := written[t]; listed {
		return known, nil
	}
	if writes(t, jsonMarshaler) {
		return "", fmt.Errorf("%s writes its own JSON: enter what it writes in the table of web/build/types", t)
	}
	if writes(t, textMarshaler) {
		return "string", nil
	}
	switch t.Kind() {
	case reflect.Bool:
		return "boolean", nil
	case reflect.String:
		return "string", nil
	case reflect.Int, reflect.Int8, reflect.Int16, reflect.Int32, reflect.Int64,
		reflect.Uint, reflect.Uint8, reflect.Uint16, reflect.Uint32, reflect.Uint64,
		reflect.Float32, reflect.Float64:
		return "number", nil
	case reflect.Interface:
		return "unknown", nil
	case reflect.Pointer:
		inner, err := w.reference(t.Elem())
		return orNull(inner), err
	case reflect.Slice:
		inner, err := w.reference(t.Elem())
		return orNull(listOf(inner)), err
	case reflect.Array:
		inner, err := w.reference(t.Elem())
		return listOf(inner), err
	case reflect.Map:
		if t.Key().Kind() != reflect.String {
			return "", fmt.Errorf("%s: keys must be text", t)
		}
		inner, err := w.reference(t.Elem())
		return orNull("Record<string, " + inner + ">"), err
	}
	return "", fmt.Errorf("%s cannot be written as JSON", t)
}

// orNull: a pointer, slice or map of Go that holds nothing is written as null.
func orNull(shape string) string {
	if shape == "unknown" || strings.HasSuffix(shape, " | null") {
		return shape
	}
	return shape + " | null"
}

func listOf(shape string) string {
	if strings.Contains(shape, " ") {
		shape = "(" + shape + ")"
	}
	return shape + "[]"
}

// property quotes a name that is no plain word of the language.
func property(name string) string {
	for i, c := range name {
		if c != '_' && (c < 'a' || c > 'z') && (c < 'A' || c > 'Z') && (i == 0 || c < '0' || c > '9') {
			return strconv.Quote(name)
		}
	}
	return name
}
