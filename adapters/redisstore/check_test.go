package redisstore

import (
	"context"
	"crypto/ecdsa"
	"crypto/elliptic"
	"crypto/rand"
	"crypto/tls"
	"crypto/x509"
	"encoding/pem"
	"errors"
	"math/big"
	"net"
	"os"
	"strings"
	"testing"
	"time"

	"galeward/adapters/storetest"
	"galeward/bot/store"
)

func TestCheck(t *testing.T) {
	for name, c := range map[string]struct {
		args     []string
		replicas int
		says     []string
	}{
		"well":         {nil, 0, nil},
		"evicts":       {[]string{"--maxmemory-policy", "allkeys-lru"}, 0, []string{`"allkeys-lru" and has to be noeviction`}},
		"evicts some":  {[]string{"--maxmemory-policy", "volatile-ttl"}, 0, []string{`"volatile-ttl" and has to be noeviction`}},
		"forgets":      {[]string{"--appendonly", "no"}, 0, []string{"appendonly has to be yes"}},
		"both":         {[]string{"--appendonly", "no", "--maxmemory-policy", "allkeys-lfu"}, 0, []string{"allkeys-lfu", "appendonly"}},
		"no replica":   {nil, 2, []string{"0 replicas and 2 are asked for"}},
		"is a replica": {[]string{"--replicaof", "127.0.0.1 1"}, 0, []string{"is a replica"}},
	} {
		t.Run(name, func(t *testing.T) {
			o := on(storetest.Redis(t, c.args...))
			o.Replicas = c.replicas
			warnings := open(t, o).Check(context.Background())
			if len(warnings) != len(c.says) {
				t.Fatalf("%q", warnings)
			}
			for i, w := range warnings {
				if !strings.Contains(w, c.says[i]) {
					t.Errorf("%q does not say %q", w, c.says[i])
				}
			}
		})
	}
}

func TestCheckOfADeadServer(t *testing.T) {
	server := storetest.Redis(t)
	s := open(t, on(server))
	server.Kill()
	w := s.Check(context.Background())
	if len(w) != 1 || !strings.Contains(w[0], "could not be looked at") || !strings.Contains(w[0], "no answer") {
		t.Fatalf("%q", w)
	}
}

func TestCheckOfACluster(t *testing.T) {
	t.Parallel() // a cluster takes seconds to form
	server := storetest.Redis(t, "--cluster-enabled", "yes", "--appendonly", "no")
	oneNode(t, server)
	o := on(server)
	o.Cluster = true
	s := open(t, o)
	if w := s.Check(context.Background()); len(w) != 1 || !strings.Contains(w[0], "appendonly") {
		t.Fatalf("%q", w)
	}
	server.Kill()
	if w := s.Check(context.Background()); len(w) != 1 || !strings.Contains(w[0], "could not be looked at") {
		t.Fatalf("%q", w)
	}
}

// narrowUser may do what the store does and nothing else: no KEYS, no SCAN, no
// CONFIG, no key outside the prefix.
const narrowUser = "user galeward on >hush resetkeys ~galeward:* resetchannels -@all +hello +auth +ping +select +evalsha +eval +get +set +del +wait +info"

func TestNarrowUserSuffices(t *testing.T) {
	server := storetest.Redis(t, "--"+narrowUser)
	o := on(server)
	o.Username, o.Password = "galeward", "hush"
	storetest.Run(t, apart(o))
	s := open(t, o)
	if w := s.Check(context.Background()); len(w) != 0 {
		t.Errorf("%q", w)
	}
	o.Replicas = 1
	if _, err := open(t, o).Do(context.Background(), room, durable("k", "v", "t")); !errors.Is(err, store.ErrNotReplicated) {
		t.Errorf("a durable write: %v", err)
	}
	o.Prefix = "elsewhere:"
	_, err := open(t, o).Do(context.Background(), room, put("k", "paco2", "t"))
	if !errors.Is(err, ErrRefused) {
		t.Errorf("outside the prefix: %v", err)
	}
	secretive(t, err)
}

// certificate makes a key and a certificate of its own for 127.0.0.1.
func certificate(t *testing.T) (certFile, keyFile string, roots *x509.CertPool) {
	t.Helper()
	key, err := ecdsa.GenerateKey(elliptic.P256(), rand.Reader)
	if err != nil {
		t.Fatal(err)
	}
	template := &x509.Certificate{SerialNumber: big.NewInt(1), NotBefore: time.Now().Add(-time.Hour), NotAfter: time.Now().Add(time.Hour),
		IPAddresses: []net.IP{net.IPv4(127, 0, 0, 1)}, IsCA: true, BasicConstraintsValid: true}
	der, err := x509.CreateCertificate(rand.Reader, template, template, &key.PublicKey, key)
	if err != nil {
		t.Fatal(err)
	}
	keyDER, err := x509.MarshalPKCS8PrivateKey(key)
	if err != nil {
		t.Fatal(err)
	}
	certPEM := pem.EncodeToMemory(&pem.Block{Type: "CERTIFICATE", Bytes: der})
	roots = x509.NewCertPool()
	roots.AppendCertsFromPEM(certPEM)
	dir := t.TempDir()
	certFile, keyFile = dir+"/cert.pem", dir+"/key.pem"
	for name, text := range map[string][]byte{certFile: certPEM, keyFile: pem.EncodeToMemory(&pem.Block{Type: "PRIVATE KEY", Bytes: keyDER})} {
		if err := os.WriteFile(name, text, 0o600); err != nil {
			t.Fatal(err)
		}
	}
	return certFile, keyFile, roots
}

func TestEncryptedConnection(t *testing.T) {
	cert, key, roots := certificate(t)
	port := storetest.FreePort(t)
	server := storetest.Redis(t, "--tls-port", port, "--tls-cert-file", cert, "--tls-key-file", key, "--tls-auth-clients", "no")
	secure := Options{Addrs: []string{"127.0.0.1:" + port}, TLS: &tls.Config{RootCAs: roots}}
	must(t, open(t, secure), put("house", "rules", "t1"))
	for name, o := range map[string]Options{
		"a certificate of nobody known": {Addrs: secure.Addrs, TLS: &tls.Config{}},
		"a plain server":                {Addrs: []string{server.Addr()}, TLS: secure.TLS},
		"a plain client":                {Addrs: secure.Addrs},
	} {
		within(t, time.Second, func() {
			_, err := open(t, o).Do(context.Background(), room, put("house", "paco2", "t2"))
			if !errors.Is(err, ErrNoAnswer) {
				t.Errorf("%s: %v", name, err)
			}
			secretive(t, err)
		})
	}
}
