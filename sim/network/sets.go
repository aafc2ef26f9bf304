package network

// Sets are disjoint sets of the indices from 0 on, each known by a member
// (union-find with path halving).
type Sets []int

// NewSets puts each of n indices into a set of its own.
func NewSets(n int) Sets {
	s := make(Sets, n)
	for i := range s {
		s[i] = i
	}
	return s
}

// Root is the member by which the set of i is known.
func (s Sets) Root(i int) int {
	for s[i] != i {
		s[i] = s[s[i]]
		i = s[i]
	}
	return i
}

// Join puts the sets of a and b together; it reports whether they were two.
func (s Sets) Join(a, b int) bool {
	a, b = s.Root(a), s.Root(b)
	s[a] = b
	return a != b
}
