package redisstore

import (
	"crypto/sha1"
	"encoding/hex"
	"strings"
	"time"

	"galeward/bot/store"
)

// script is one call of the contract. An item is a string: a byte for the
// kind, a byte for the length of the tag, the tag, the value. The first
// argument says whether the call is given again after a lost reply; then come
// four for each key: the condition ("" for none, "a" for absent, "t" and the
// tag), what to do ("r", "w", "d"), the item to write, its lifetime in
// milliseconds or "0". The reply is the outcome and the items as they stood.
//
// No item is written before all conditions are tried, and a server without
// room refuses the first write of a script or none, so it is all or nothing.
// The script declares no flags: a server without room would then refuse it
// also where it only reads.
const script = `
local reply, stood, conflict = {0}, false, false
for i, key in ipairs(KEYS) do
  local at = 4 * i - 2
  local item, tag = redis.call('GET', key), false
  if item then
    if string.byte(item, 1) ~= 1 then return redis.error_reply('FOREIGN a key holds another program\'s value') end
    tag = string.sub(item, 3, 2 + string.byte(item, 2))
  end
  reply[i + 1] = item
  if ARGV[1] == '1' and ARGV[at + 1] == 'w' and item == ARGV[at + 2] then stood = true end
  local cond = ARGV[at]
  if cond == 'a' and item or cond ~= '' and cond ~= 'a' and (not tag or 't' .. tag ~= cond) then conflict = true end
end
if stood then reply[1] = 2 return reply end
if conflict then reply[1] = 1 return reply end
for i, key in ipairs(KEYS) do
  local at = 4 * i - 2
  if ARGV[at + 1] == 'd' then
    redis.call('DEL', key)
  elseif ARGV[at + 1] == 'w' then
    if ARGV[at + 3] == '0' then redis.call('SET', key, ARGV[at + 2])
    else redis.call('SET', key, ARGV[at + 2], 'PX', ARGV[at + 3]) end
  end
end
return reply
`

// The outcomes that the script replies.
const (
	wrote    = 0
	conflict = 1
	stood    = 2
)

const itemKind = 1

var scriptHash = func() string {
	sum := sha1.Sum([]byte(script)) // the name that the protocol gives a script, not a safeguard
	return hex.EncodeToString(sum[:])
}()

// call is one Do in the words of the script.
type call struct {
	ops     []store.Op
	keys    []string
	args    []any
	durable bool
}

func newCall(prefix, partition string, ops []store.Op) *call {
	c := &call{ops: ops, keys: make([]string, len(ops)), args: make([]any, 0, 4*len(ops))}
	start := prefix + "{" + braceless.Replace(partition) + "}:"
	for i, op := range ops {
		c.keys[i] = start + op.Key
		c.args = append(c.args, condition(op.If))
		switch {
		case op.Delete:
			c.args = append(c.args, "d", "", 0)
		case op.Tag != "":
			c.args = append(c.args, "w", encode(op), int64((op.TTL+time.Millisecond-1)/time.Millisecond))
		default:
			c.args = append(c.args, "r", "", 0)
		}
		c.durable = c.durable || op.Durable
	}
	return c
}

// braceless keeps braces out of a partition, so that the part between the
// braces is the partition, the same for all its keys, and never empty.
var braceless = strings.NewReplacer("%", "%25", "{", "%7B", "}", "%7D")

func condition(tag *string) string {
	switch {
	case tag == nil:
		return ""
	case *tag == "":
		return "a"
	}
	return "t" + *tag
}

// repeatable says whether the call may be given again when its reply was lost:
// one that only reads, or one with a tag to know it by.
func (c *call) repeatable() bool {
	reads := true
	for _, op := range c.ops {
		if op.Tag != "" {
			return true
		}
		reads = reads && !op.Writes()
	}
	return reads
}

func encode(op store.Op) []byte {
	b := make([]byte, 0, 2+len(op.Tag)+len(op.Value))
	b = append(b, itemKind, byte(len(op.Tag)))
	b = append(b, op.Tag...)
	return append(b, op.Value...)
}

func decode(s string) (store.Item, error) {
	if len(s) < 2 || s[0] != itemKind || len(s) < 2+int(s[1]) {
		return store.Item{}, errForeign
	}
	tag, value := s[2:2+int(s[1])], s[2+int(s[1]):]
	return store.Item{Value: []byte(value), Tag: tag}, nil
}
