package boltstore

import (
	"errors"
	"fmt"
	"os"
	"path/filepath"
	"time"

	"go.etcd.io/bbolt"
	bolterr "go.etcd.io/bbolt/errors"
)

const (
	lockWait = 250 * time.Millisecond // a process that is just ending lets go in this time
	fileMode = 0o600                  // the channel's numbers are nobody else's
)

// Open opens the file at path, and makes it when there is none. The folder
// has to exist. Errors: ErrInUse, ErrDamaged, ErrNewer, or what the system
// says.
func Open(path string, o Options) (*Store, error) {
	db, err := openFile(path, o.MaxBytes)
	if err != nil {
		return nil, err
	}
	s := &Store{db: db, now: o.Now}
	if s.now == nil {
		s.now = time.Now
	}
	if err := s.prepare(path); err != nil {
		_ = s.Close() // the refusal is the news
		return nil, err
	}
	return s, nil
}

// openFile opens the file with its client. Where the client gives up half-way
// with a panic, the lock on the damaged file stays until the process ends.
func openFile(path string, maxBytes int) (db *bbolt.DB, err error) {
	err = guard(func() (err error) {
		db, err = bbolt.Open(path, fileMode, &bbolt.Options{
			Timeout:      lockWait,
			FreelistType: bbolt.FreelistMapType, // stays quick in a file that was once much bigger
			MaxSize:      maxBytes,
		})
		return err
	})
	return db, refusal(path, err)
}

// refusal says in one sentence why a file was not opened.
func refusal(path string, err error) error {
	switch {
	case err == nil:
		return nil
	case errors.Is(err, bolterr.ErrTimeout):
		return fmt.Errorf("%w: %s", ErrInUse, path)
	case errors.Is(err, bolterr.ErrInvalid), errors.Is(err, bolterr.ErrChecksum), errors.Is(err, bolterr.ErrVersionMismatch),
		errors.Is(err, bolterr.ErrInvalidMapping):
		return fmt.Errorf("%w: %s (%w)", ErrDamaged, path, err)
	case errors.Is(err, ErrDamaged), errors.Is(err, ErrNewer):
		return fmt.Errorf("%w: %s", err, path)
	case errors.Is(err, os.ErrNotExist):
		return fmt.Errorf("boltstore: the folder %s does not exist", filepath.Dir(path))
	case errors.Is(err, os.ErrPermission):
		return fmt.Errorf("boltstore: this user may not read and write %s", path)
	}
	return fmt.Errorf("boltstore: opening %s: %w", path, err)
}

// prepare looks through an old file and lays out a new one.
func (s *Store) prepare(path string) error {
	empty := false
	err := s.view(func(tx *bbolt.Tx) error {
		if name, _ := tx.Cursor().First(); name == nil {
			empty = true
			return nil
		}
		return inspect(tx)
	})
	if err == nil && empty {
		err = s.update(layOut)
	}
	return refusal(path, err)
}
