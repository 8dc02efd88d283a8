package jsontree_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/examples/jsontree"
	"example.com/holdtime/examples/position"
)

func TestRead(t *testing.T) {
	root, err := jsontree.Read(position.NewSource("file", []byte("\uFEFF{\"°\": [1e3, \"x\"],\n \"b\": {\"c\": null}} \n")))
	require.NoError(t, err)
	assert.Equal(t, &jsontree.Node{Offset: 0, Kind: jsontree.Object, Fields: []jsontree.Field{
		{Name: "°", Offset: 1, Value: &jsontree.Node{Offset: 7, Kind: jsontree.List, Items: []*jsontree.Node{
			{Offset: 8, Kind: jsontree.Number, Text: "1e3"}, {Offset: 13, Kind: jsontree.Text, Text: "x"}}}},
		{Name: "b", Offset: 20, Value: &jsontree.Node{Offset: 25, Kind: jsontree.Object, Fields: []jsontree.Field{
			{Name: "c", Offset: 26, Value: &jsontree.Node{Offset: 31, Kind: jsontree.Null}}}}},
	}}, root)
}

func TestFaults(t *testing.T) {
	for text, says := range map[string]string{
		"":                     "f:1:1: the file ends too early",
		"{\"a\": 1,\n":         "f:2:1: the file ends too early",
		"{\"a\": 1},":          "f:1:9: there is something after the end",
		"{} {}":                "f:1:4: there is something after the end",
		"{\"a\": 1, \"a\": 2}": "f:1:10: the field \"a\" is given twice",
		"{\"a\": 1,}":          "f:1:9: not JSON",
		"{\"°\": 01}":          "f:1:8: not JSON",
		"[1 2]":                "f:1:4: not JSON",
		"\"abc":                "f:1:1: this text has no closing quotation mark",
	} {
		_, err := jsontree.Read(position.NewSource("f", []byte(text)))
		var fault *position.Error
		require.ErrorAs(t, err, &fault, text)
		assert.Contains(t, err.Error(), says, text)
	}
}
