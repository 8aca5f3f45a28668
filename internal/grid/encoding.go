package grid

import "errors"

// CheckEncoding says what is wrong with the name of an encoding, or gives nil if text can be read in it.
func CheckEncoding(name string) *Fault {
	_, err := findPage(name)
	if f, ok := errors.AsType[*Fault](err); ok {
		return f
	}
	return nil
}
