package main

import "context"

// await returns what f returns, or the error of ctx as soon as ctx is done. f
// is then left to itself: what it was computing is dropped, and the program
// ends without waiting for it. f must therefore touch nothing that outlives
// the program, such as a file.
func await[T any](ctx context.Context, f func() (T, error)) (T, error) {
	type result struct {
		value T
		err   error
	}
	done := make(chan result, 1)
	go func() {
		v, err := f()
		done <- result{v, err}
	}()
	select {
	case r := <-done:
		return r.value, r.err
	case <-ctx.Done():
		var none T
		return none, ctx.Err()
	}
}
