package syntax

// packed returns an object of an object stream (7.5.7).
func (f *File) packed(container Ref, index int) (Value, error) {
	values, known := f.containers[container]
	if !known {
		if f.places[container].container != 0 {
			return nil, damaged("object stream %d is in another", container)
		}
		s, err := As[*Stream](f, container)
		if err != nil {
			return nil, err
		}
		if values, err = f.unpack(s); err != nil {
			return nil, err
		}
		f.containers[container] = values
	}
	if index < 0 || index >= len(values) {
		return nil, damaged("object stream %d has no object %d", container, index)
	}
	return values[index], nil
}

// unpack reads all objects of an object stream.
func (f *File) unpack(s *Stream) ([]Value, error) {
	data, err := f.Decode(s)
	if err != nil {
		return nil, err
	}
	count, err := f.Int(s.Dict["N"])
	if err != nil {
		return nil, err
	}
	first, err := f.Int(s.Dict["First"])
	if err != nil {
		return nil, err
	}
	var values []Value
	head := f.lexer(data, 0)
	for range count {
		_, ok := head.integer()
		at, ok2 := head.integer()
		if !ok || !ok2 || first < 0 || at > len(data)-first {
			return nil, damaged("head of an object stream")
		}
		v, err := f.lexer(data, first+at).value()
		if err != nil {
			return nil, err
		}
		values = append(values, v)
	}
	return values, nil
}
