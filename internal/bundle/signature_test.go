package bundle

import (
	"crypto/ecdsa"
	"crypto/ed25519"
	"crypto/elliptic"
	"crypto/rand"
	"crypto/rsa"
	"crypto/x509"
	"encoding/base64"
	"encoding/hex"
	"encoding/json"
	"encoding/pem"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"testing/fstest"

	opabundle "github.com/open-policy-agent/opa/v1/bundle"
	"github.com/open-policy-agent/opa/v1/util"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle/bundletest"
)

// signed signs a folder of a file system as `opa sign --bundle` does: the name of a folder that was signed stands before
// each path. It puts the signature into the file system.
func signed(t *testing.T, fsys fstest.MapFS, dir, before, key, kind string) fstest.MapFS {
	t.Helper()
	hash, err := opabundle.NewSignatureHasher(opabundle.SHA256)
	require.NoError(t, err)
	var list []opabundle.FileInfo
	for name, f := range fsys {
		rel, ok := strings.CutPrefix(name, dir+"/")
		if !ok || rel == signaturesFile {
			continue
		}
		var value any = f.Data
		if opabundle.IsStructuredDoc(rel) {
			require.NoError(t, util.Unmarshal(f.Data, &value))
		}
		sum, err := hash.HashFile(value)
		require.NoError(t, err)
		list = append(list, opabundle.NewFile(before+rel, hex.EncodeToString(sum), string(opabundle.SHA256)))
	}
	token, err := opabundle.GenerateSignedToken(list, opabundle.NewSigningConfig(key, kind, ""), "")
	require.NoError(t, err)
	text, err := json.Marshal(map[string]any{"signatures": []string{token}})
	require.NoError(t, err)
	fsys[dir+"/"+signaturesFile] = &fstest.MapFile{Data: text}
	return fsys
}

func fileWith(t *testing.T, text string) string {
	t.Helper()
	name := filepath.Join(t.TempDir(), "key")
	require.NoError(t, os.WriteFile(name, []byte(text), 0o600))
	return name
}

// pair makes a private key as PEM, and the file of its public key.
func pair(t *testing.T, private any, public any) (string, string) {
	t.Helper()
	a, err := x509.MarshalPKCS8PrivateKey(private)
	require.NoError(t, err)
	b, err := x509.MarshalPKIXPublicKey(public)
	require.NoError(t, err)
	return string(pem.EncodeToMemory(&pem.Block{Type: "PRIVATE KEY", Bytes: a})), fileWith(t, string(pem.EncodeToMemory(&pem.Block{Type: "PUBLIC KEY", Bytes: b})))
}

func rsaPair(t *testing.T) (string, string) {
	k, err := rsa.GenerateKey(rand.Reader, 2048)
	require.NoError(t, err)
	return pair(t, k, &k.PublicKey)
}

func ecPair(t *testing.T, curve elliptic.Curve) (string, string) {
	k, err := ecdsa.GenerateKey(curve, rand.Reader)
	require.NoError(t, err)
	return pair(t, k, &k.PublicKey)
}

const secret = "a secret of everybody, for tests only"

func openWith(t *testing.T, fsys fstest.MapFS, key string) (*Source, error) {
	t.Helper()
	k, err := ReadKey(key)
	require.NoError(t, err)
	return OpenSource(filepath.Join(written(t, fsys, "small"), "small"), k)
}

func TestSignaturesOfEveryKindAreVerified(t *testing.T) {
	_, edPrivate, err := ed25519.GenerateKey(rand.Reader)
	require.NoError(t, err)
	rsaPrivate, rsaPublic := rsaPair(t)
	for kind, keys := range map[string]func() (string, string){
		"RS256": func() (string, string) { return rsaPrivate, rsaPublic }, "PS512": func() (string, string) { return rsaPrivate, rsaPublic },
		"ES256": func() (string, string) { return ecPair(t, elliptic.P256()) }, "ES384": func() (string, string) { return ecPair(t, elliptic.P384()) },
		"EdDSA": func() (string, string) { return pair(t, edPrivate, edPrivate.Public()) },
		"HS256": func() (string, string) { return secret, fileWith(t, secret) }, "HS512": func() (string, string) { return secret, fileWith(t, secret) },
	} {
		for _, before := range []string{"", "policies/small/"} {
			private, public := keys()
			s, err := openWith(t, signed(t, bundletest.Small(), "small", before, private, kind), public)
			require.NoError(t, err, kind)
			shelf, err := NewShelf(s)
			require.NoError(t, err)
			b, problems := shelf.Open("small")
			require.NoError(t, problems.Err())
			assert.Equal(t, SignatureVerified, b.Signature, kind)
		}
	}
}

func TestSignedBundleWithoutKeyIsNotChecked(t *testing.T) {
	fsys := signed(t, bundletest.Small(), "small", "", secret, "HS256")
	s, err := OpenSource(filepath.Join(written(t, fsys, "small"), "small"), nil)
	require.NoError(t, err)
	shelf, err := NewShelf(s)
	require.NoError(t, err)
	h, problems := shelf.Head("small")
	require.NoError(t, problems.Err())
	assert.Equal(t, SignatureNotChecked, h.Signature)
	assert.Equal(t, signed(t, bundletest.Small(), "small", "", secret, "HS256")["small/about/data.yaml"].Data, s.files["small/about/data.yaml"].Data)
}

// TestEveryChangeBreaksTheSignature: of whatever file, also of one that OPA would not read.
func TestEveryChangeBreaksTheSignature(t *testing.T) {
	key := fileWith(t, secret)
	good := func() fstest.MapFS {
		fsys := bundletest.Small()
		fsys["small/cases/a.yaml"] = &fstest.MapFile{Data: []byte("[]\n")}
		return signed(t, fsys, "small", "", secret, "HS256")
	}
	_, err := openWith(t, good(), key)
	require.NoError(t, err)
	for file := range good() {
		if !strings.HasPrefix(file, "small/") || file == "small/"+signaturesFile {
			continue
		}
		fsys := good()
		fsys[file] = &fstest.MapFile{Data: append([]byte("{} "), fsys[file].Data...)}
		_, err := openWith(t, fsys, key)
		require.ErrorContains(t, err, strings.TrimPrefix(file, "small/")+": the file is not as it was signed", file)
		fsys = good()
		delete(fsys, file)
		_, err = openWith(t, fsys, key)
		if file == "small/"+manifest {
			require.ErrorContains(t, err, "it holds no bundle")
			continue
		}
		require.ErrorContains(t, err, "signed files are missing: "+strings.TrimPrefix(file, "small/"), file)
	}
	fsys := good()
	fsys["small/duty/more/more.rego"] = &fstest.MapFile{Data: []byte("package duty.more\n")}
	_, err = openWith(t, fsys, key)
	require.ErrorContains(t, err, "duty/more/more.rego: the file is not as it was signed")
	fsys = good()
	fsys["small/cases/"+signaturesFile] = fsys["small/"+signaturesFile]
	_, err = openWith(t, fsys, key)
	require.ErrorContains(t, err, "cases/.signatures.json: the file is not as it was signed")
}

func TestSignaturesAreRefused(t *testing.T) {
	private, public := rsaPair(t)
	otherPrivate, _ := rsaPair(t)
	rsaText, err := os.ReadFile(public)
	require.NoError(t, err)
	replaced := func(text string) fstest.MapFS {
		fsys := bundletest.Small()
		fsys["small/"+signaturesFile] = &fstest.MapFile{Data: []byte(text)}
		return fsys
	}
	unsigned := base64.RawURLEncoding.EncodeToString([]byte(`{"alg":"none"}`)) + "." + base64.RawURLEncoding.EncodeToString([]byte(`{"files":[]}`)) + "."
	for name, c := range map[string]struct {
		fsys      fstest.MapFS
		key, want string
	}{
		"none":                      {bundletest.Small(), public, "the bundle is not signed, but a key was given"},
		"another key":               {signed(t, bundletest.Small(), "small", "", otherPrivate, "RS256"), public, "the signature does not fit the key in " + public},
		"another secret":            {signed(t, bundletest.Small(), "small", "", secret, "HS256"), fileWith(t, secret+"\n"), "the signature does not fit the key"},
		"a secret for a public key": {signed(t, bundletest.Small(), "small", "", secret, "HS256"), public, `the signature is of the kind "HS256", and the key verifies RS256`},
		"the public key as secret":  {signed(t, bundletest.Small(), "small", "", string(rsaText[5:]), "HS256"), public, `the signature is of the kind "HS256", and the key verifies RS256`},
		"a kind that signs nothing": {replaced(`{"signatures": ["` + unsigned + `"]}`), public, `the signature is of the kind "none"`},
		"no token":                  {replaced(`{"signatures": []}`), public, "the file holds 0 signatures, and 1 is wanted"},
		"two tokens":                {replaced(`{"signatures": ["a", "b"]}`), public, "the file holds 2 signatures"},
		"a broken token":            {replaced(`{"signatures": ["a.b.c"]}`), public, "the token cannot be read"},
		"a broken file":             {replaced(`{`), public, "the file cannot be read"},
		"a plugin":                  {replaced(`{"plugin": "x", "signatures": ["a"]}`), public, `the plugin "x" is not known`},
		"no manifest":               {signed(t, fstest.MapFS{"small/x": {}}, "small", "", private, "RS256"), public, "it holds no bundle"},
		"of another bundle": {merge(bundletest.Small(), signed(t, fstest.MapFS{"small/.manifest": bundletest.Small()["small/.manifest"], "small/x": {}}, "small", "", private, "RS256")), public,
			"the file is not as it was signed"},
		"of several folders": {merge(bundletest.Small(), signed(t, fstest.MapFS{"small/a/.manifest": {Data: []byte("{}")}, "small/b": {}}, "small", "", private, "RS256")), public,
			"it is about files of several folders, such as b"},
		"without a manifest": {merge(bundletest.Small(), signed(t, fstest.MapFS{"small/b": {}}, "small", "", private, "RS256")), public, "it is not about the .manifest"},
	} {
		t.Run(name, func(t *testing.T) {
			s, err := openWith(t, c.fsys, c.key)
			require.ErrorContains(t, err, c.want)
			assert.Nil(t, s)
		})
	}
}

func merge(into, from fstest.MapFS) fstest.MapFS {
	for name, f := range from {
		if _, ok := into[name]; !ok {
			into[name] = f
		}
	}
	return into
}

// TestNeighboursMustBeSigned: a bundle that is signed may not lean on one beside it that is not.
func TestNeighboursMustBeSigned(t *testing.T) {
	key, err := ReadKey(fileWith(t, secret))
	require.NoError(t, err)
	fsys := extended("", "", "")
	delete(fsys, "common/.manifest")
	signed(t, fsys, "over", "", secret, "HS256")
	dir := written(t, fsys)
	_, err = OpenSource(filepath.Join(dir, "over"), key)
	require.ErrorContains(t, err, filepath.Join(dir, "small")+": the bundle is not signed, but a key was given")
	dir = written(t, signed(t, fsys, "small", "", secret, "HS256"))
	s, err := OpenSource(filepath.Join(dir, "over"), key)
	require.NoError(t, err)
	assert.Equal(t, map[string]string{"over": SignatureVerified, "small": SignatureVerified}, s.signed)
}

func TestKeysAreRefused(t *testing.T) {
	private, _ := rsaPair(t)
	for name, c := range map[string]struct{ file, want string }{
		"none":    {"no/such/key", "the key cannot be read"},
		"empty":   {fileWith(t, " \n"), "the file holds no key"},
		"private": {fileWith(t, private), "the file holds the private key, which only signs; keep it secret"},
		"damaged": {fileWith(t, "-----BEGIN PUBLIC KEY-----\nx"), "the key is damaged"},
		"other":   {fileWith(t, "-----BEGIN X-----\n-----END X-----\n"), "a block X is no public key"},
		"huge":    {fileWith(t, strings.Repeat("x", maxKeyBytes+1)), "the file holds no key"},
	} {
		t.Run(name, func(t *testing.T) {
			_, err := ReadKey(c.file)
			require.ErrorContains(t, err, c.want)
		})
	}
}
