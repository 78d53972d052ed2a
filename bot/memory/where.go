package memory

import (
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"net/url"
	"strings"
)

// Where is a place on a platform. Thread is "" outside a thread.
type Where struct {
	Platform, Workspace, Channel, Thread string
}

// partition is the store's partition of the channel. Each part is escaped, so
// that no name can forge another channel's partition.
func (w Where) partition() string {
	return escape(w.Platform) + "/" + escape(w.Workspace) + "/" + escape(w.Channel)
}

// longest is the most bytes of a part as it stands; what is longer is hashed,
// to stay within the limits of a key.
const longest = 120

// escape makes one part of a key or partition. The tilde marks a hash and is
// therefore escaped itself.
func escape(part string) string {
	s := strings.ReplaceAll(url.PathEscape(part), "~", "%7E")
	if len(s) <= longest {
		return s
	}
	sum := sha256.Sum256([]byte(part))
	return "~" + hex.EncodeToString(sum[:])
}

// The keys inside a partition.
const houseKey = "house"

func revisionKey(n int) string        { return fmt.Sprintf("house/rev/%06d", n) }
func claimKey(delivery string) string { return "said/" + escape(delivery) }
func threadKey(thread string) string  { return "thread/" + escape(thread) }

// flatKey and metKey hold a hash for the user: two people's gases never mix,
// and no name stands beside a gas.
func flatKey(partition, user string) string { return "flat/" + pseudonym(partition, user) }
func metKey(partition, user string) string  { return "met/" + pseudonym(partition, user) }

// pseudonym is a name for a user that is of no use in another channel.
func pseudonym(partition, user string) string {
	sum := sha256.Sum256([]byte(partition + "\x00" + user))
	return hex.EncodeToString(sum[:16])
}
