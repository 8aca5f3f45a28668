package bundle

import (
	"testing"

	"github.com/stretchr/testify/require"
)

func TestEmbeddedBundlesLoad(t *testing.T) {
	library, err := Embedded()
	require.NoError(t, err)
	require.Contains(t, library.IDs(), "us-osha-general-industry")
}
