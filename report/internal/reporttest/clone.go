package reporttest

import (
	"reflect"
	"sync"

	"linewitness/sim/record"
)

// made gives copies of a record that is made once: making one takes as long as
// laying it out, and a test may change what it gets.
func made(make func() *record.Record) func() *record.Record {
	first := sync.OnceValue(make)
	return func() *record.Record {
		out := *first()
		own(reflect.ValueOf(&out).Elem())
		return &out
	}
}

// own gives a value memory of its own.
func own(v reflect.Value) {
	switch v.Kind() {
	case reflect.Struct:
		for i := range v.NumField() {
			own(v.Field(i))
		}
	case reflect.Pointer:
		if !v.IsNil() {
			p := reflect.New(v.Type().Elem())
			p.Elem().Set(v.Elem())
			own(p.Elem())
			v.Set(p)
		}
	case reflect.Slice:
		if v.IsNil() {
			return
		}
		s := reflect.MakeSlice(v.Type(), v.Len(), v.Len())
		reflect.Copy(s, v)
		v.Set(s)
		switch v.Type().Elem().Kind() {
		case reflect.Struct, reflect.Pointer, reflect.Slice:
			for i := range v.Len() {
				own(v.Index(i))
			}
		}
	}
}
