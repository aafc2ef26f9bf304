package report

import (
	"reflect"

	"linewitness/report/typeset"
	"linewitness/sim/record"
)

// cleaned returns a copy of r with every text made fit for one line. Slices
// of numbers and bytes are shared with r, which stays as it was.
func cleaned(r *record.Record) *record.Record {
	out := *r
	clean(reflect.ValueOf(&out).Elem())
	return &out
}

func clean(v reflect.Value) {
	switch v.Kind() {
	case reflect.String:
		v.SetString(typeset.Clean(v.String()))
	case reflect.Struct:
		for i := range v.NumField() {
			clean(v.Field(i))
		}
	case reflect.Pointer:
		if v.IsNil() || v.Type().Elem().Kind() != reflect.Struct {
			return
		}
		own := reflect.New(v.Type().Elem())
		own.Elem().Set(v.Elem())
		clean(own.Elem())
		v.Set(own)
	case reflect.Slice:
		if kind := v.Type().Elem().Kind(); v.Len() == 0 || kind != reflect.Struct && kind != reflect.String {
			return
		}
		own := reflect.MakeSlice(v.Type(), v.Len(), v.Len())
		reflect.Copy(own, v)
		for i := range own.Len() {
			clean(own.Index(i))
		}
		v.Set(own)
	}
}
