package lang

import "reflect"

// unparen is a copy of a tree without its Paren nodes. It walks by reflection
// so that no kind of node can be forgotten.
func unparen(n any) any {
	return strip(reflect.ValueOf(n)).Interface()
}

var exprType = reflect.TypeFor[Expr]()

func strip(v reflect.Value) reflect.Value {
	switch v.Kind() {
	case reflect.Interface:
		if v.IsNil() {
			return v
		}
		w := reflect.New(v.Type()).Elem()
		w.Set(strip(v.Elem()))
		return w
	case reflect.Pointer:
		if v.IsNil() {
			return v
		}
		if p, ok := v.Interface().(*Paren); ok {
			return strip(reflect.ValueOf(&p.X).Elem()).Elem()
		}
		if v.Type().Implements(exprType) || v.Elem().Kind() == reflect.Struct && v.Elem().Type().PkgPath() == exprType.PkgPath() {
			w := reflect.New(v.Type().Elem())
			for i := range v.Elem().NumField() {
				if f := w.Elem().Field(i); f.CanSet() {
					f.Set(strip(v.Elem().Field(i)))
				}
			}
			return w
		}
	case reflect.Slice:
		if v.IsNil() {
			return v
		}
		w := reflect.MakeSlice(v.Type(), v.Len(), v.Len())
		for i := range v.Len() {
			w.Index(i).Set(strip(v.Index(i)))
		}
		return w
	case reflect.Struct:
		if v.Type().PkgPath() == exprType.PkgPath() {
			w := reflect.New(v.Type()).Elem()
			for i := range v.NumField() {
				if f := w.Field(i); f.CanSet() {
					f.Set(strip(v.Field(i)))
				}
			}
			return w
		}
	}
	return v
}
