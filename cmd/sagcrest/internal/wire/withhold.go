package wire

import (
	"fmt"
	"reflect"
	"strconv"
	"strings"
)

// withhold sets what stands at a path of the result to null; a verdict becomes
// "withheld". A path that leads to nothing is a mistake of the program, except
// that parts of what is null already are.
func withhold(r *Result, path string) {
	v := reflect.ValueOf(r).Elem()
	for step := range strings.SplitSeq(path, ".") {
		name, index, indexed := strings.Cut(strings.TrimSuffix(step, "]"), "[")
		for v.Kind() == reflect.Pointer {
			if v.IsNil() {
				return
			}
			v = v.Elem()
		}
		v = field(v, name, path)
		if !indexed {
			continue
		}
		for v.Kind() == reflect.Pointer {
			if v.IsNil() {
				return
			}
			v = v.Elem()
		}
		i, err := strconv.Atoi(index)
		if err != nil || i >= v.Len() {
			panic(fmt.Sprintf("no such row: %s", path))
		}
		v = v.Index(i)
	}
	switch v.Kind() {
	case reflect.Pointer:
		v.SetZero()
	case reflect.String:
		v.SetString("withheld")
	default:
		panic(fmt.Sprintf("not nullable: %s", path))
	}
}

// field finds a struct field by its key.
func field(v reflect.Value, name, path string) reflect.Value {
	for i := range v.NumField() {
		if key, _, _ := strings.Cut(v.Type().Field(i).Tag.Get("json"), ","); key == name {
			return v.Field(i)
		}
	}
	panic(fmt.Sprintf("no such key %q: %s", name, path))
}
