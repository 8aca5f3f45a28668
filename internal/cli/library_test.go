package cli

import (
	"encoding/hex"
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"

	opabundle "github.com/open-policy-agent/opa/v1/bundle"
	"github.com/open-policy-agent/opa/v1/util"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// TestReportSaysThatASignatureWasVerified signs a bundle as OPA does, and judges by it with and without the key.
func TestReportSaysThatASignatureWasVerified(t *testing.T) {
	t.Chdir(t.TempDir())
	code, _, stderr := call("template", "bundle", "mine")
	require.Equal(t, exitClean, code, stderr)
	const secret = "a secret of everybody, for tests only"
	require.NoError(t, os.WriteFile("secret.txt", []byte(secret), 0o600))
	require.NoError(t, os.WriteFile("workers.csv", []byte("worker_id,site,sex,birth_date,hired_on\n001,a,male,1980-01-02,2020-01-01\n"), 0o600))
	require.NoError(t, os.WriteFile("program.yaml", []byte("program: x\nas_of: 2026-06-30\nsites: [{id: a, bundles: [mine]}]\nrecords: [workers.csv]\n"), 0o600))
	sign(t, "mine", secret)
	signature := func(args ...string) (string, string) {
		code, stdout, stderr := call(append([]string{"check", "--policies", "mine", "--fail-on", "none", "--format", "json"}, args...)...)
		require.Equal(t, exitClean, code, stderr)
		var report struct {
			Bundles []struct{ ID, Signature string }
		}
		require.NoError(t, json.Unmarshal([]byte(stdout), &report))
		require.Len(t, report.Bundles, 1)
		return report.Bundles[0].ID, report.Bundles[0].Signature
	}
	for want, args := range map[string][]string{"verified": {"--policies-key", "secret.txt"}, "not checked": nil} {
		id, got := signature(args...)
		assert.Equal(t, "mine", id)
		assert.Equal(t, want, got)
	}
	_, stdout, _ := call("check", "--policies", "mine", "--policies-key", "secret.txt")
	assert.Contains(t, strings.Join(strings.Fields(stdout), " "), "Not embedded, signature verified.")
	_, stdout, _ = call("check", "--policies", "mine", "--policies-key", "secret.txt", "--format", "html")
	assert.Contains(t, stdout, ", not embedded, signature verified. SHA-256")
	_, stdout, _ = call("bundles", "--policies", "mine", "--policies-key", "secret.txt")
	assert.Contains(t, strings.Join(strings.Fields(stdout), " "), "Read from mine. Not embedded, signature verified.")

	require.NoError(t, os.WriteFile("mine/CHANGES.md", []byte("changed"), 0o600))
	code, stdout, stderr = call("check", "--policies", "mine", "--policies-key", "secret.txt")
	assert.Equal(t, exitFailed, code)
	assert.Empty(t, stdout)
	assert.Contains(t, stderr, "mine/CHANGES.md: the file is not as it was signed: ")
	for _, command := range [][]string{{"bundles"}, {"bundle", "mine"}, {"explain", "f-1"}, {"rehearse", "mine"}, {"switch", "--to", "mine"}, {"sample", "--size", "1"}} {
		code, _, stderr = call(append(command, "--policies", "mine", "--policies-key", "secret.txt")...)
		assert.Equal(t, exitFailed, code, command)
		assert.Contains(t, stderr, "the file is not as it was signed", command)
	}
}

// sign puts a signature into the folder of a bundle.
func sign(t *testing.T, dir, secret string) {
	t.Helper()
	hash, err := opabundle.NewSignatureHasher(opabundle.SHA256)
	require.NoError(t, err)
	var list []opabundle.FileInfo
	require.NoError(t, filepath.WalkDir(dir, func(file string, entry os.DirEntry, err error) error {
		if err != nil || entry.IsDir() {
			return err
		}
		content, err := os.ReadFile(file)
		require.NoError(t, err)
		var value any = content
		if opabundle.IsStructuredDoc(file) {
			require.NoError(t, util.Unmarshal(content, &value))
		}
		sum, err := hash.HashFile(value)
		require.NoError(t, err)
		list = append(list, opabundle.NewFile(filepath.ToSlash(file), hex.EncodeToString(sum), string(opabundle.SHA256)))
		return nil
	}))
	token, err := opabundle.GenerateSignedToken(list, opabundle.NewSigningConfig(secret, "HS256", ""), "")
	require.NoError(t, err)
	text, err := json.Marshal(map[string]any{"signatures": []string{token}})
	require.NoError(t, err)
	require.NoError(t, os.WriteFile(filepath.Join(dir, ".signatures.json"), text, 0o600))
}
