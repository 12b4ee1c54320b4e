package canon

import "sync"

// solvedMemo remembers the results of costly solutions by their arguments. It
// holds at most two generations of limit entries: when the young one is full it
// becomes the old one, and what is asked for again is carried over.
type solvedMemo[K comparable, V any] struct {
	mu         sync.Mutex
	limit      int
	young, old map[K]V
}

func newSolvedMemo[K comparable, V any](limit int) *solvedMemo[K, V] {
	return &solvedMemo[K, V]{limit: limit, young: make(map[K]V)}
}

// of returns the value for the key, which solve computes if it is not known.
// Two callers may solve the same key at once; both get the same value.
func (m *solvedMemo[K, V]) of(key K, solve func() V) V {
	if v, ok := m.get(key); ok {
		return v
	}
	v := solve()
	m.mu.Lock()
	defer m.mu.Unlock()
	m.put(key, v)
	return v
}

func (m *solvedMemo[K, V]) get(key K) (V, bool) {
	m.mu.Lock()
	defer m.mu.Unlock()
	if v, ok := m.young[key]; ok {
		return v, true
	}
	v, ok := m.old[key]
	if ok {
		m.put(key, v)
	}
	return v, ok
}

// put stores with the lock held.
func (m *solvedMemo[K, V]) put(key K, v V) {
	if len(m.young) >= m.limit {
		m.old, m.young = m.young, make(map[K]V)
	}
	m.young[key] = v
}

// size counts the entries held.
func (m *solvedMemo[K, V]) size() int {
	m.mu.Lock()
	defer m.mu.Unlock()
	return len(m.young) + len(m.old)
}
