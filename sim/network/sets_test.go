package network

import "testing"

// TestSets: joined indices have one root, others have not, and joining again
// tells that nothing was two.
func TestSets(t *testing.T) {
	s := NewSets(6)
	for _, tt := range []struct {
		a, b int
		two  bool
	}{{0, 1, true}, {2, 3, true}, {1, 2, true}, {0, 3, false}, {4, 4, false}, {3, 3, false}} {
		if got := s.Join(tt.a, tt.b); got != tt.two {
			t.Errorf("join %d and %d: two %v", tt.a, tt.b, got)
		}
	}
	for i := range 6 {
		if same, want := s.Root(i) == s.Root(0), i < 4; same != want {
			t.Errorf("%d in the set of 0: %v", i, same)
		}
	}
}
