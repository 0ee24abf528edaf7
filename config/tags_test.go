package config

import (
	"reflect"
	"testing"

	"github.com/stretchr/testify/assert"
)

// Every field of the file types has a key, and every number a range that can
// be read: a malformed tag would panic in front of a user.
func TestEveryTagCanBeRead(t *testing.T) {
	seen := map[reflect.Type]bool{}
	var walk func(typ reflect.Type)
	walk = func(typ reflect.Type) {
		for typ.Kind() == reflect.Pointer || typ.Kind() == reflect.Slice {
			typ = typ.Elem()
		}
		if typ.Kind() != reflect.Struct || isNumeric(typ) || seen[typ] {
			return
		}
		seen[typ] = true
		for _, f := range fields(typ) {
			assert.NotEmpty(t, f.key, "%v", typ)
			if f.limits != "" {
				low, high, _, _ := parseLimits(f.limits)
				assert.Less(t, low, high, "%v %s", typ, f.key)
			}
			walk(f.typ)
		}
	}
	walk(reflect.TypeFor[fileProject]())
	assert.Greater(t, len(seen), 20, "the walk reaches every table")
}

// Keys that are refused as not built are no known keys, else they would be
// read and ignored.
func TestNoKeyIsBothKnownAndUnbuilt(t *testing.T) {
	var walk func(typ reflect.Type, path string)
	walk = func(typ reflect.Type, path string) {
		for typ.Kind() == reflect.Pointer || typ.Kind() == reflect.Slice {
			typ = typ.Elem()
		}
		if typ.Kind() != reflect.Struct || isNumeric(typ) {
			return
		}
		for _, f := range fields(typ) {
			assert.False(t, unbuilt(join(path, f.key)), join(path, f.key))
			walk(f.typ, join(path, f.key))
		}
	}
	walk(reflect.TypeFor[fileProject](), "")
}

func TestEveryAcceptableCodeIsInTheCatalogue(t *testing.T) {
	assert.Len(t, codes(), 115)
	for i := 0; i+3 <= len(acceptable); i += 4 {
		assert.Contains(t, codes(), acceptable[i:i+3])
	}
}
