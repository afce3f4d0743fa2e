package study

import (
	"reflect"
	"strings"
	"testing"
)

// numericPaths lists the paths of the numbers of a type, with 0 for the places
// of lists.
func numericPaths(t reflect.Type, path string, found func(string)) {
	switch t.Kind() {
	case reflect.Pointer:
		numericPaths(t.Elem(), path, found)
	case reflect.Slice, reflect.Array:
		numericPaths(t.Elem(), path+".0", found)
	case reflect.Struct:
		for i := range t.NumField() {
			if name, _, _ := strings.Cut(t.Field(i).Tag.Get("json"), ","); name != "" {
				numericPaths(t.Field(i).Type, path+"."+name, found)
			}
		}
	case reflect.Float64, reflect.Int:
		found(strings.TrimPrefix(path, "."))
	}
}

// Every number that a cell can hold has a rule of its walk back: a formula with
// its inputs, or the reason why there is none. A new number of the report needs
// a row in walkRules.
func TestEveryNumberOfACellHasARule(t *testing.T) {
	n, used := 0, map[string]bool{}
	numericPaths(reflect.TypeOf(Cell{}), "", func(path string) {
		n++
		rule, _ := ruleOf(path)
		if rule == nil {
			t.Errorf("%s has no row in walkRules: say how it is computed from which numbers, or why the walk ends there", path)
			return
		}
		used[rule.path] = true
		if rule.name == "" || (rule.calc == nil || rule.in == nil) && rule.why == "" || rule.calc != nil && rule.why != "" {
			t.Errorf("%s: a rule has a name, and either a calculation with inputs or a reason", path)
		}
	})
	if n < 140 {
		t.Errorf("only %d numbers were looked at", n)
	}
	for _, rule := range walkRules {
		if !used[rule.path] && !strings.HasSuffix(rule.path, "**") && rule.path != "sources.*.at.*" && !strings.HasPrefix(rule.path, "taken.") {
			t.Errorf("the rule of %s is of no number of a cell", rule.path)
		}
	}
}
