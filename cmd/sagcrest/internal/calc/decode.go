package calc

import (
	"fmt"
	"reflect"
	"sort"
)

// decode fills a struct from the inputs of a call. Every name must be one of its
// tags; what is absent stays nil.
func decode(raw map[string]any, dst any, s System) *Fault {
	return fill(raw, reflect.ValueOf(dst).Elem(), "", s)
}

func fill(raw map[string]any, v reflect.Value, prefix string, s System) *Fault {
	fields, names := map[string]int{}, []string{}
	for i := range v.NumField() {
		name := jsonName(v.Type().Field(i))
		fields[name] = i
		names = append(names, name)
	}
	given := make([]string, 0, len(raw))
	for name := range raw {
		given = append(given, name)
	}
	sort.Strings(given)
	for _, name := range given {
		i, ok := fields[name]
		if !ok {
			return unknownName(prefix+name, names)
		}
		if raw[name] == nil {
			continue // null is as good as absent
		}
		if fault := set(raw[name], v.Field(i), prefix+name, v.Type().Field(i).Tag.Get("unit"), s); fault != nil {
			return fault
		}
	}
	return nil
}

// set converts one value into a field: numbers, texts, truths, lists of numbers,
// lists of lists, objects.
func set(value any, dst reflect.Value, name, kind string, s System) *Fault {
	wrong := func(err error) *Fault {
		return &Fault{"F04", name, fmt.Sprintf("%s: %v", name, err), "write a number in the units of the call, or a text with its unit", nil}
	}
	switch dst.Kind() {
	case reflect.Pointer:
		dst.Set(reflect.New(dst.Type().Elem()))
		return set(value, dst.Elem(), name, kind, s)
	case reflect.Float64:
		f, err := number(value, kind, s)
		if err != nil {
			return wrong(err)
		}
		dst.SetFloat(f)
	case reflect.String:
		text, ok := value.(string)
		if !ok {
			return wrong(fmt.Errorf("a word is wanted"))
		}
		dst.SetString(text)
	case reflect.Bool:
		truth, ok := value.(bool)
		if !ok {
			return wrong(fmt.Errorf("true or false is wanted"))
		}
		dst.SetBool(truth)
	case reflect.Slice:
		list, ok := value.([]any)
		if !ok {
			return wrong(fmt.Errorf("a list is wanted, such as [1, 2]"))
		}
		dst.Set(reflect.MakeSlice(dst.Type(), len(list), len(list)))
		for i, x := range list {
			if fault := set(x, dst.Index(i), fmt.Sprintf("%s[%d]", name, i), kind, s); fault != nil {
				return fault
			}
		}
	case reflect.Struct:
		object, ok := value.(map[string]any)
		if !ok {
			return wrong(fmt.Errorf("an object is wanted, such as {\"station\": 100, \"elev\": 50}"))
		}
		return fill(object, dst, name+".", s)
	case reflect.Map:
		object, ok := value.(map[string]any)
		if !ok {
			return wrong(fmt.Errorf("an object is wanted"))
		}
		dst.Set(reflect.ValueOf(object))
	case reflect.Interface:
		dst.Set(reflect.ValueOf(value))
	default:
		panic("calc: no input of kind " + dst.Kind().String())
	}
	return nil
}
