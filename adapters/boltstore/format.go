package boltstore

import (
	"encoding/binary"
	"fmt"
	"time"

	"go.etcd.io/bbolt"

	"galeward/bot/store"
)

// The file has three buckets. About holds the format number. Items has one
// entry per item: the key is the partition's length in two bytes, the
// partition and the item's key; the value is a header (kind, end, length of
// the tag), the tag and the value. Ends has one entry per item with a
// lifetime, its key being the end and the item's whole key: the first entries
// are those to clear first.
var (
	aboutBucket = []byte("galeward about")
	itemsBucket = []byte("galeward items")
	endsBucket  = []byte("galeward ends")
	formatKey   = []byte("format")
)

const (
	format     = "1"
	recordKind = 1
	headLen    = 1 + 8 + 1
)

func itemKey(partition, key string) []byte {
	k := make([]byte, 0, 2+len(partition)+len(key))
	k = binary.BigEndian.AppendUint16(k, uint16(len(partition)))
	k = append(k, partition...)
	return append(k, key...)
}

func endKey(ends int64, item []byte) []byte {
	k := make([]byte, 0, 8+len(item))
	k = binary.BigEndian.AppendUint64(k, uint64(ends))
	return append(k, item...)
}

// endOf tells the last instant, in milliseconds since 1970, of something
// written now; 0 for what is kept. It rounds up, so that even the shortest
// lifetime is one.
func endOf(now time.Time, ttl time.Duration) int64 {
	if ttl == 0 {
		return 0
	}
	return now.Add(ttl + time.Millisecond - 1).UnixMilli()
}

func record(item store.Item, ends int64) []byte {
	r := make([]byte, 0, headLen+len(item.Tag)+len(item.Value))
	r = append(r, recordKind)
	r = binary.BigEndian.AppendUint64(r, uint64(ends))
	r = append(r, byte(len(item.Tag)))
	r = append(r, item.Tag...)
	return append(r, item.Value...)
}

// readRecord copies an item out of the file; r is the file's own memory.
func readRecord(r []byte) (item store.Item, ends int64, err error) {
	if len(r) < headLen || r[0] != recordKind || len(r) < headLen+int(r[9]) {
		return item, 0, fmt.Errorf("%w: an entry can't be read", ErrDamaged)
	}
	ends = int64(binary.BigEndian.Uint64(r[1:9]))
	tag, value := r[headLen:headLen+int(r[9])], r[headLen+int(r[9]):]
	return store.Item{Value: append([]byte(nil), value...), Tag: string(tag)}, ends, nil
}

func over(ends int64, now time.Time) bool { return ends != 0 && now.UnixMilli() >= ends }

func layOut(tx *bbolt.Tx) error {
	for _, name := range [][]byte{aboutBucket, itemsBucket, endsBucket} {
		if _, err := tx.CreateBucket(name); err != nil {
			return err
		}
	}
	return tx.Bucket(aboutBucket).Put(formatKey, []byte(format))
}

// inspect refuses files of others and reads every entry once, so that damage
// shows at the start and not at the first question.
func inspect(tx *bbolt.Tx) error {
	about, items, ends := tx.Bucket(aboutBucket), tx.Bucket(itemsBucket), tx.Bucket(endsBucket)
	if about == nil || items == nil || ends == nil {
		return fmt.Errorf("%w: it belongs to another program", ErrDamaged)
	}
	if f := string(about.Get(formatKey)); f != format {
		return fmt.Errorf("%w (format %q, this binary knows %q)", ErrNewer, f, format)
	}
	err := items.ForEach(func(_, r []byte) error {
		_, _, err := readRecord(r)
		return err
	})
	if err != nil {
		return err
	}
	return ends.ForEach(func(k, _ []byte) error {
		if len(k) <= 8 {
			return fmt.Errorf("%w: an entry can't be read", ErrDamaged)
		}
		return nil
	})
}
