package intake

// marks remembers what came first under each of many keys. It takes two to three times the size of a key and its
// value, in one piece that holds no pointers, so that millions cost no work of the garbage collector.
type marks[K hashed, V any] struct {
	slots []marked[K, V] // a power of two of them; a zero key is a free slot
	used  int
}

// hashed is a digest: all its bits are alike by chance only, and it is never zero.
type hashed interface {
	comparable
	hash() uint64
}

type marked[K hashed, V any] struct {
	key   K
	value V
}

const fewestSlots = 64

// mark remembers the value under the key, unless there is one already, which it gives.
func (m *marks[K, V]) mark(key K, value V) (first V, double bool) {
	if 4*m.used >= 3*len(m.slots) {
		m.grow()
	}
	s := m.slot(key)
	if s.key == key {
		return s.value, true
	}
	s.key, s.value = key, value
	m.used++
	return value, false
}

// get gives the value under the key, if there is one.
func (m *marks[K, V]) get(key K) (value V, ok bool) {
	if m.used == 0 {
		return value, false
	}
	s := m.slot(key)
	return s.value, s.key == key
}

// slot finds the slot of a key, or the free one where it belongs.
func (m *marks[K, V]) slot(key K) *marked[K, V] {
	var free K
	last := uint64(len(m.slots) - 1)
	for i := key.hash() & last; ; i = (i + 1) & last {
		if s := &m.slots[i]; s.key == key || s.key == free {
			return s
		}
	}
}

func (m *marks[K, V]) grow() {
	var free K
	old := m.slots
	m.slots = make([]marked[K, V], max(2*len(old), fewestSlots))
	for i := range old {
		if old[i].key != free {
			*m.slot(old[i].key) = old[i]
		}
	}
}
