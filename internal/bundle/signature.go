package bundle

import (
	"bytes"
	"crypto/ecdsa"
	"crypto/ed25519"
	"crypto/rsa"
	"crypto/x509"
	"encoding/base64"
	"encoding/json"
	"encoding/pem"
	"errors"
	"fmt"
	"maps"
	"os"
	"path"
	"slices"
	"strings"

	opabundle "github.com/open-policy-agent/opa/v1/bundle"
)

// What is known of the signature of a bundle.
const (
	SignatureEmbedded   = "embedded"    // it is built into the program
	SignatureVerified   = "verified"    // it fits the key given
	SignatureNotChecked = "not checked" // there is one, but no key was given
	SignatureNone       = "unsigned"
)

// Signatures lists what can be known of the signature of a bundle.
var Signatures = []string{SignatureEmbedded, SignatureVerified, SignatureNotChecked, SignatureNone}

// signaturesFile holds the signature of a bundle, as OPA writes it.
const signaturesFile = ".signatures.json"

// Key verifies signatures: a public key, or a secret shared with whoever signs.
type Key struct {
	file  string // as it was named
	text  string
	kinds []string // of signatures that such a key verifies, by their names in a JSON Web Token
}

// maxKeyBytes is more than any key has.
const maxKeyBytes = 64 << 10

// ReadKey reads a key from a file: a public key or certificate as PEM, or else a secret for HMAC. As in OPA, every byte
// of a secret counts, the end of the line, too.
func ReadKey(file string) (*Key, error) {
	text, err := os.ReadFile(file)
	switch {
	case err != nil:
		return nil, refuse(file, "Name the file with the public key or the secret", "the key cannot be read: %v", errors.Unwrap(err))
	case len(bytes.TrimSpace(text)) == 0 || len(text) > maxKeyBytes:
		return nil, refuse(file, "Name the file with the public key or the secret", "the file holds no key")
	}
	k := &Key{file: file, text: string(text), kinds: []string{"HS256", "HS384", "HS512"}}
	if !bytes.Contains(text, []byte("-----BEGIN")) {
		return k, nil
	}
	public, err := publicKey(text)
	if err != nil {
		return nil, refuse(file, "Write the public key, from BEGIN PUBLIC KEY to END PUBLIC KEY", "%v", err)
	}
	switch public := public.(type) {
	case *rsa.PublicKey:
		k.kinds = []string{"RS256", "RS384", "RS512", "PS256", "PS384", "PS512"}
	case *ecdsa.PublicKey:
		k.kinds = []string{map[int]string{256: "ES256", 384: "ES384", 521: "ES512"}[public.Curve.Params().BitSize]}
	case ed25519.PublicKey:
		k.kinds = []string{"EdDSA"}
	default:
		return nil, refuse(file, "Sign with RSA, ECDSA or Ed25519", "the key is of a kind that signs no bundles")
	}
	return k, nil
}

func publicKey(text []byte) (any, error) {
	block, _ := pem.Decode(text)
	if block == nil {
		return nil, errors.New("the key is damaged")
	}
	switch {
	case strings.HasSuffix(block.Type, "PRIVATE KEY"):
		return nil, errors.New("the file holds the private key, which only signs; keep it secret")
	case block.Type == "RSA PUBLIC KEY":
		return x509.ParsePKCS1PublicKey(block.Bytes)
	case block.Type == "PUBLIC KEY":
		return x509.ParsePKIXPublicKey(block.Bytes)
	case block.Type == "CERTIFICATE":
		c, err := x509.ParseCertificate(block.Bytes)
		if err != nil {
			return nil, err
		}
		return c.PublicKey, nil
	}
	return nil, fmt.Errorf("a block %s is no public key", block.Type)
}

// signature tells what is known of the signature of a folder of the source. With a key the signature must be there and
// fit; the error says what does not.
func (s *Source) signature(dir string, key *Key) (string, error) {
	signed := s.files[path.Join(dir, signaturesFile)]
	shown := s.places[dir] + "/" + signaturesFile
	switch {
	case signed == nil && key == nil:
		return SignatureNone, nil
	case signed == nil:
		return "", refuse(s.places[dir], "Have it signed by whoever holds the key, with: opa sign --bundle FOLDER; or leave out --policies-key", "the bundle is not signed, but a key was given")
	case key == nil:
		return SignatureNotChecked, nil
	}
	names, err := key.verified(signed.Data)
	if err != nil {
		return "", refuse(shown, "Do not use the bundle unless you know why; ask whoever signed it", "the signature does not fit the key in %s: %v", key.file, err)
	}
	for _, name := range slices.Sorted(maps.Keys(s.files)) {
		rel, ok := strings.CutPrefix(name, dir+"/")
		if !ok || rel == signaturesFile {
			continue
		}
		if err := opabundle.VerifyBundleFile(rel, *bytes.NewBuffer(s.files[name].Data), names); err != nil {
			return "", refuse(s.places[dir]+"/"+rel, "Do not use the bundle; ask whoever signed it", "the file is not as it was signed: %v", err)
		}
	}
	if len(names) > 0 { // a file that fits is taken away
		return "", refuse(s.places[dir], "Do not use the bundle; ask whoever signed it", "signed files are missing: %s", strings.Join(slices.Sorted(maps.Keys(names)), ", "))
	}
	return SignatureVerified, nil
}

// verified gives the files that a signature is about, if it fits the key. OPA's own code verifies it.
func (k *Key) verified(text []byte) (map[string]opabundle.FileInfo, error) {
	var config opabundle.SignaturesConfig
	if err := json.Unmarshal(text, &config); err != nil {
		return nil, fmt.Errorf("the file cannot be read: %w", err)
	}
	if len(config.Signatures) != 1 {
		return nil, fmt.Errorf("the file holds %d signatures, and 1 is wanted", len(config.Signatures))
	}
	if config.Plugin != "" {
		return nil, fmt.Errorf("the plugin %q is not known", config.Plugin)
	}
	kind, err := kindOf(config.Signatures[0])
	if err != nil {
		return nil, err
	}
	if !slices.Contains(k.kinds, kind) { // the token must not choose how a key is used
		return nil, fmt.Errorf("the signature is of the kind %q, and the key verifies %s", kind, strings.Join(k.kinds, ", "))
	}
	const id = "key"
	keys := map[string]*opabundle.KeyConfig{id: {Key: k.text, Algorithm: kind}}
	signed, err := opabundle.VerifyBundleSignature(config, opabundle.NewVerificationConfig(keys, id, "", nil))
	if err != nil {
		return nil, err
	}
	return withoutFolder(signed)
}

// kindOf reads from the head of a token of which kind its signature is.
func kindOf(token string) (string, error) {
	head, _, _ := strings.Cut(token, ".")
	text, err := base64.RawURLEncoding.DecodeString(head)
	var header struct {
		Alg string `json:"alg"`
	}
	if err == nil {
		err = json.Unmarshal(text, &header)
	}
	if err != nil {
		return "", fmt.Errorf("the token cannot be read: %w", err)
	}
	return header.Alg, nil
}

// withoutFolder gives the signed names as paths within the bundle. Where a folder was signed, OPA puts its name before
// each of them.
func withoutFolder(signed map[string]opabundle.FileInfo) (map[string]opabundle.FileInfo, error) {
	folder, found := "", false
	for name := range signed {
		if dir, file := path.Split(name); file == manifest && (!found || len(dir) < len(folder)) {
			folder, found = dir, true
		}
	}
	if !found {
		return nil, fmt.Errorf("it is not about the %s", manifest)
	}
	out := map[string]opabundle.FileInfo{}
	for name, info := range signed {
		rel, ok := strings.CutPrefix(name, folder)
		if !ok {
			return nil, fmt.Errorf("it is about files of several folders, such as %s", name)
		}
		out[rel] = info
	}
	return out, nil
}
