package shorthand

import "sync"

// foldTable maps single characters to what they mean on a typed line. Data
// only; the ranges that follow a rule stand in fold.go.
var foldTable = sync.OnceValue(buildFoldTable)

func buildFoldTable() map[rune]string {
	t := map[rune]string{}
	for meaning, runes := range foldGroups {
		for _, r := range runes {
			t[r] = meaning
		}
	}
	latin, bare := []rune(accented), []rune(unaccented)
	for i, r := range latin {
		t[r] = string(bare[i])
	}
	looks, plain := []rune(lookalikes), []rune(lookalikePlain)
	for i, r := range looks {
		t[r] = string(plain[i])
	}
	return t
}

var foldGroups = map[string]string{
	" ":    "\u00a0\u1680\u2000\u2001\u2002\u2003\u2004\u2005\u2006\u2007\u2008\u2009\u200a\u202f\u205f\u3000\u3164",
	"":     "\u00ad\u200b\u200c\u200d\u2060\ufeff\ufe0e\ufe0f\u20e3\u207b\u207a\u00b0\u00ae\u2122",
	"-":    "\u2010\u2011\u2012\u2013\u2014\u2015\u2212\u2796\ufe58\ufe63\u02d7\u2043",
	"+":    "\u2795\ufe62",
	"/":    "\u2044\u2215\u29f8\u2571\u00f7\u2797",
	"\\":   "\u2216\u29f5\ufe68",
	"|":    "\u00a6\u2502\u2503\u2223\u01c0",
	"'":    "\u2018\u2019\u201a\u201b\u2032\u02bc\u00b4\u02b9\u2035",
	"\"":   "\u201c\u201d\u201e\u201f\u2033\u00ab\u00bb\u02ba",
	"*":    "\u2022\u25cf\u25aa\u25e6\u2219\u25cb\u2023\u25ba",
	".":    "\u00b7\u22c5\u2024\u3002\u066b",
	",":    "\u060c\u3001\u066c",
	":":    "\u2236\ua789\u02d0",
	";":    "\u061b\u037e",
	"%":    "\u066a\u2030\ufe6a",
	"x":    "\u00d7\u2715\u2716\u2a09",
	"<":    "\u2264\u2a7d\u2039",
	">":    "\u2265\u2a7e\u203a",
	"->":   "\u2192\u21d2\u27a1\u279c\u2794\u27f6\u21e8\u27f9\u2799\u279d\u279e",
	"~":    "\u2248\u223c\u02dc",
	" ~ ":  "\u00b1",
	".25":  "\u00bc",
	".5":   "\u00bd",
	".75":  "\u00be",
	"0":    "\u2070",
	"1":    "\u00b9",
	"2":    "\u00b2",
	"3":    "\u00b3",
	"4":    "\u2074",
	"ss":   "\u00df",
	"ae":   "\u00e6",
	"mmHg": "\u33a1",
	"kPa":  "\u33aa",
	"kg":   "\u338f",
	"cm":   "\u339d",
	"mL":   "\u3396",
}

const (
	accented   = "àáâãäåçèéêëìíîïñòóôõöøùúûüýÿÀÁÂÃÄÅÇÈÉÊËÌÍÎÏÑÒÓÔÕÖØÙÚÛÜÝĀāĂăĄąĆćČčĎďĒēĖėĘęĚěĞğĪīİıŁłŃńŇňŌōŐőŘřŚśŞşŠšŤťŪūŮůŰűŹźŻżŽžªº"
	unaccented = "aaaaaaceeeeiiiinoooooouuuuyyAAAAAACEEEEIIIINOOOOOOUUUUYAaAaAaCcCcDdEeEeEeEeGgIiIiLlNnNnOoOoRrSsSsSsTtUuUuUuZzZzZzao"

	// lookalikes are letters of other alphabets that a phone keyboard leaves
	// inside Latin words.
	lookalikes     = "аеорсухкмтнвгіјѕԁАВЕКМНОРСТХУІЈЅαονρτυκιΑΒΕΗΙΚΜΝΟΡΤΧΥΖ"
	lookalikePlain = "aeopcyxkmthbrijsdABEKMHOPCTXYIJSaovptukiABEHIKMNOPTXYZ"
)
