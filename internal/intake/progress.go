package intake

import "context"

// Progress is told now and then how far the reading is: the file and the rows of it that were read. At the
// end it is told an empty file.
type Progress func(file string, rows int)

type progressKey struct{}

// WithProgress gives a context whose readings tell their progress. The function is called from the
// goroutine that reads, each few milliseconds or less.
func WithProgress(ctx context.Context, tell Progress) context.Context {
	return context.WithValue(ctx, progressKey{}, tell)
}

func progressOf(ctx context.Context) Progress {
	if tell, ok := ctx.Value(progressKey{}).(Progress); ok && tell != nil {
		return tell
	}
	return func(string, int) {}
}
