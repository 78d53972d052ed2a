package main

import (
	"crypto/tls"
	"crypto/x509"
	"os"
)

// redisTLS gives the settings of encrypted connections, nil for plain ones.
func redisTLS(s storeSettings) (*tls.Config, error) {
	if !s.RedisTLS && s.RedisCAFile == "" {
		return nil, nil
	}
	config := &tls.Config{MinVersion: tls.VersionTLS12}
	if s.RedisCAFile == "" {
		return config, nil
	}
	pem, err := os.ReadFile(s.RedisCAFile)
	if err != nil {
		return nil, usageError{err}
	}
	config.RootCAs = x509.NewCertPool()
	if !config.RootCAs.AppendCertsFromPEM(pem) {
		return nil, usagef("redis-ca-file: %s holds no certificate in PEM form", s.RedisCAFile)
	}
	return config, nil
}
