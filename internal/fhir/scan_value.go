package fhir

// value reads the next value.
func (s *scanner) value(depth int) (node, error) {
	c, err := s.peek()
	if err != nil {
		return node{}, err
	}
	if s.values++; s.values > maxValues {
		s.over = true
	}
	switch {
	case depth > maxDepth && (c == '{' || c == '['):
		return node{}, s.broken("the JSON is nested more than %d levels deep", maxDepth)
	case c == '{':
		return s.object(depth)
	case c == '[':
		return s.list(depth)
	case c == '"':
		_, _ = s.next()
		t, cut, err := s.text()
		return node{kind: text, text: t, cut: cut}, err
	case c == '-' || c >= '0' && c <= '9':
		return s.number()
	case c == 't':
		return s.word("true", boolean)
	case c == 'f':
		return s.word("false", boolean)
	case c == 'n':
		return s.word("null", null)
	}
	return node{}, s.unexpected(c, "a value")
}

func (s *scanner) object(depth int) (node, error) {
	n := node{kind: object}
	_, _ = s.next()
	var names map[string]bool // once there are many
	for first := true; ; first = false {
		if more, err := s.more('}', first); err != nil || !more {
			return n, err
		}
		key, err := s.key()
		if err != nil {
			return n, err
		}
		item, err := s.value(depth + 1)
		if err != nil {
			return n, err
		}
		if s.over {
			continue
		}
		if len(n.keys) == 16 {
			names = map[string]bool{}
			for _, k := range n.keys {
				names[k] = true
			}
		}
		if s.twice == "" && (names[key] || names == nil && contains(n.keys, key)) {
			s.twice = key
		}
		if names != nil {
			names[key] = true
		}
		n.keys, n.items = append(n.keys, key), append(n.items, item)
	}
}

func contains(words []string, word string) bool {
	for _, w := range words {
		if w == word {
			return true
		}
	}
	return false
}

func (s *scanner) list(depth int) (node, error) {
	n := node{kind: list}
	_, _ = s.next()
	for first := true; ; first = false {
		if more, err := s.more(']', first); err != nil || !more {
			return n, err
		}
		item, err := s.value(depth + 1)
		if err != nil {
			return n, err
		}
		if !s.over {
			n.items = append(n.items, item)
		}
	}
}

func (s *scanner) word(word string, k kind) (node, error) {
	for i := range len(word) {
		c, err := s.next()
		if err != nil {
			return node{}, err
		}
		if c != word[i] {
			s.back(c)
			return node{}, s.broken("the JSON is broken: a word stands there that is none of true, false and null")
		}
	}
	return node{kind: k, text: word}, nil
}

// number reads a number by the grammar of JSON.
func (s *scanner) number() (node, error) {
	s.buf = s.buf[:0]
	state := 'a' // what came before: a nothing, - sign, 0 leading zero, 1 digits, . point, 2 decimals, e, s sign of e, 3 its digits
	for {
		c, err := s.r.ReadByte()
		if err == nil {
			next := follows(state, c)
			if next != 0 {
				state = next
				if len(s.buf) < maxText {
					s.buf = append(s.buf, c)
				}
				continue
			}
			_ = s.r.UnreadByte()
		}
		switch state {
		case '0', '1', '2', '3':
			s.keep(len(s.buf))
			return node{kind: number, text: string(s.buf), cut: len(s.buf) == maxText}, nil
		}
		return node{}, s.broken("the JSON is broken: a number is not complete")
	}
}

// follows gives the state after c in a number, or 0 if c does not belong to it.
func follows(state rune, c byte) rune {
	digit := c >= '0' && c <= '9'
	switch {
	case state == 'a' && c == '-':
		return '-'
	case (state == 'a' || state == '-') && c == '0':
		return '0'
	case (state == 'a' || state == '-' || state == '1') && digit:
		return '1'
	case (state == '0' || state == '1') && c == '.':
		return '.'
	case (state == '.' || state == '2') && digit:
		return '2'
	case (state == '0' || state == '1' || state == '2') && (c == 'e' || c == 'E'):
		return 'e'
	case state == 'e' && (c == '+' || c == '-'):
		return 's'
	case (state == 'e' || state == 's' || state == '3') && digit:
		return '3'
	}
	return 0
}
