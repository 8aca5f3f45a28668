// Package pseudonym puts codes in place of the ids of persons, between reading the records and everything else. With
// the same key an id has the same code in every run; without the key nobody can tell the id from the code.
//
// A code is a letter for what it stands for and ten signs of Crockford's base 32, the first 50 bits of
// HMAC-SHA256(key, kind, a zero byte, id).
package pseudonym

import (
	"crypto/hmac"
	"crypto/sha256"
	"encoding/binary"
	"fmt"
	"hash"
	"regexp"
	"strings"

	"hearduty/internal/record"
)

// Kind is a kind of ids that codes stand for.
type Kind string

// The kinds. Persons are testers, reviewers, trainers and whoever else did something; audiograms and measurements
// have codes since their ids may hold that of the worker.
const (
	Worker      Kind = "worker"
	Person      Kind = "person"
	Audiogram   Kind = "audiogram"
	Measurement Kind = "measurement"
	Certificate Kind = "certificate"
	Examination Kind = "examination"
)

// letters begin the codes of each kind.
var letters = map[Kind]byte{Worker: 'W', Person: 'P', Audiogram: 'A', Measurement: 'M', Certificate: 'C', Examination: 'E'}

const (
	alphabet = "0123456789ABCDEFGHJKMNPQRSTVWXYZ" // Crockford's: without I, L, O and U
	length   = 11                                 // of a code
)

type code [length]byte

// Veil puts codes in place of ids. Record is for one goroutine at a time; what only looks codes up may be called by
// several, once all records went through.
type Veil struct {
	mac   hash.Hash
	sum   []byte
	input []byte
	ids   map[code]string          // what each code stands for
	often map[Kind]map[string]code // codes of the ids that come often
	plans map[record.Kind]*plan
	err   error
}

// New makes a veil with a key.
func New(key []byte) (*Veil, error) {
	if err := checkKey(key); err != nil {
		return nil, err
	}
	return &Veil{
		mac: hmac.New(sha256.New, key), ids: map[code]string{}, plans: map[record.Kind]*plan{},
		often: map[Kind]map[string]code{Worker: {}, Person: {}},
	}, nil
}

// Code gives the code of an id; that of an empty id is empty.
func (v *Veil) Code(k Kind, id string) string {
	if id == "" {
		return ""
	}
	if c, ok := v.often[k][id]; ok {
		return string(c[:])
	}
	c := v.code(k, id)
	switch known, ok := v.ids[c]; {
	case !ok:
		v.ids[c] = strings.Clone(id) // the id shares memory with its whole row
	case known != id && v.err == nil:
		v.err = fmt.Errorf("two different ids of the kind %s have the same code under this key; use another key file", k)
	}
	if often := v.often[k]; often != nil {
		often[v.ids[c]] = c
	}
	return string(c[:])
}

func (v *Veil) code(k Kind, id string) code {
	v.mac.Reset()
	v.input = append(append(append(v.input[:0], k...), 0), id...)
	v.mac.Write(v.input)
	v.sum = v.mac.Sum(v.sum[:0])
	bits := binary.BigEndian.Uint64(v.sum)
	c := code{letters[k]}
	for i := 1; i < length; i++ {
		c[i] = alphabet[bits>>59]
		bits <<= 5
	}
	return c
}

// Err says that two ids have the same code, which would make one of two persons.
func (v *Veil) Err() error { return v.err }

// codes finds what may be a code in a text.
var codes = regexp.MustCompile(`[WPAMCE][0-9A-HJKMNP-TV-Z]{10}`)

// Real puts the ids back in place of the codes in a text.
func (v *Veil) Real(text string) string {
	if v == nil {
		return text
	}
	return codes.ReplaceAllStringFunc(text, func(s string) string {
		if id, ok := v.ids[code([]byte(s))]; ok {
			return id
		}
		return s
	})
}

// words finds what may be an id in a text that people wrote.
var words = regexp.MustCompile(`[\pL\pN]+(?:[-_./][\pL\pN]+)*`)

// Text puts codes in place of the ids of workers and other persons that stand in a text as words of their own. It
// knows only ids that records have; ids that are short numbers, or words without a number, stay.
func (v *Veil) Text(text string) string {
	if v == nil {
		return text
	}
	return words.ReplaceAllStringFunc(text, func(word string) string {
		if !strings.ContainsAny(word, "0123456789") || len(word) < 3 {
			return word
		}
		for _, k := range []Kind{Worker, Person} {
			if c, ok := v.often[k][word]; ok {
				return string(c[:])
			}
		}
		return word
	})
}
