package pseudonym

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
)

// The size of a key, in bytes.
const (
	leastKey = 32
	mostKey  = 1 << 16
)

// Load makes a veil with the key that a file holds, byte for byte. It may hold anything that nobody can guess.
func Load(path string) (*Veil, error) {
	f, err := os.Open(path)
	if err != nil {
		return nil, cannotRead(path, err)
	}
	defer f.Close()
	key, err := io.ReadAll(io.LimitReader(f, mostKey+1))
	if err != nil {
		return nil, cannotRead(path, err)
	}
	if len(key) > mostKey {
		return nil, fmt.Errorf("the key file %s is larger than a key can be (64 KiB); make one with `hearduty key FILE`", path)
	}
	v, err := New(key)
	if err != nil {
		return nil, fmt.Errorf("the key file %s cannot be used: %w", path, err)
	}
	return v, nil
}

func cannotRead(path string, err error) error {
	var at *fs.PathError
	if errors.As(err, &at) {
		err = at.Err
	}
	return fmt.Errorf("the key file %s cannot be read: %w; make one with `hearduty key FILE`, and keep it", path, err)
}

// checkKey refuses keys that could be guessed. It cannot tell whether a long one is good.
func checkKey(key []byte) error {
	if len(key) < leastKey {
		return fmt.Errorf("the key has %d bytes and needs %d at least, since a short one can be guessed; make one with `hearduty key FILE`", len(key), leastKey)
	}
	seen := map[byte]bool{}
	for _, b := range key {
		seen[b] = true
	}
	if len(seen) < leastVariety {
		return fmt.Errorf("the key repeats so few different bytes (%d) that it can be guessed; make one with `hearduty key FILE`", len(seen))
	}
	return nil
}

// leastVariety is the number of different bytes in a key. 64 hexadecimal digits by chance have fewer with a chance
// below one in a million.
const leastVariety = 8
