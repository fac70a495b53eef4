package main

import (
	"encoding/xml"
	"errors"
	"io"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// pages makes pages of many kinds: arcs that cross nothing, one edge, many; all patterns
// of weights.
func pages(t *testing.T) map[string]string {
	t.Helper()
	return map[string]string{
		"scenario": runIn(t).ok(t).read(t, "gallery.html"),
		"base":     runIn(t, "-weights", "1,0,1 0,0,0", "-slopes", "0/1 1/0 1/1").ok(t).read(t, "gallery.html"),
		"long":     runIn(t, "-weights", "0,0,0", "-slopes", "1/24 -17/4 9/13").ok(t).read(t, "gallery.html"),
		"weights":  runIn(t, "-weights", "7,2,1 40,0,0 0,1,2", "-slopes", "2/3 -1/2").ok(t).read(t, "gallery.html"),
	}
}

// elements reads a page as strict XML and returns its start tags, each with the text
// directly in it.
func elements(t *testing.T, page string) []element {
	t.Helper()
	d := xml.NewDecoder(strings.NewReader(page))
	d.Strict = true
	var all []element
	var open []int
	for {
		token, err := d.Token()
		if errors.Is(err, io.EOF) {
			require.Empty(t, open)
			return all
		}
		require.NoError(t, err)
		switch token := token.(type) {
		case xml.StartElement:
			e := element{name: token.Name.Local, attributes: map[string]string{}}
			if len(open) > 0 {
				all[open[len(open)-1]].children = append(all[open[len(open)-1]].children, e.name)
			}
			for _, a := range token.Attr {
				e.attributes[a.Name.Local] = a.Value
			}
			open = append(open, len(all))
			all = append(all, e)
		case xml.EndElement:
			open = open[:len(open)-1]
		case xml.CharData:
			if len(open) > 0 {
				all[open[len(open)-1]].text += string(token)
			}
		}
	}
}

type element struct {
	name, text string
	attributes map[string]string
	children   []string
}

// TestPages reads every page as strict XML and looks at its elements.
func TestPages(t *testing.T) {
	for name, page := range pages(t) {
		t.Run(name, func(t *testing.T) {
			all := elements(t, page)
			t.Run("values are printed", func(t *testing.T) {
				assert.NotContains(t, page, "ZgotmplZ", "a value that the template refused")
				assert.NotContains(t, page, "%!", "a format that does not fit")
				assert.NotContains(t, page, "NaN")
			})
			t.Run("links lead to the entries", func(t *testing.T) { checkLinks(t, all) })
			t.Run("nothing is loaded", func(t *testing.T) {
				assert.NotContains(t, page, "@import")
				assert.NotContains(t, page, "url(")
				checkSelfContained(t, all)
			})
			t.Run("accessible", func(t *testing.T) { checkAccessible(t, all) })
		})
	}
}

func checkLinks(t *testing.T, all []element) {
	ids, links := map[string]bool{}, map[string]bool{}
	for _, e := range all {
		if id, ok := e.attributes["id"]; ok {
			assert.False(t, ids[id], "id %s twice", id)
			ids[id] = true
		}
		if e.name == "a" {
			links[strings.TrimPrefix(e.attributes["href"], "#")] = true
		}
	}
	assert.NotEmpty(t, ids)
	assert.Equal(t, ids, links)
}

// checkSelfContained: no script, and nothing comes from anywhere else.
func checkSelfContained(t *testing.T, all []element) {
	for _, e := range all {
		assert.NotContains(t, []string{"script", "link", "iframe", "object", "use", "image", "img"}, e.name)
		assert.NotContains(t, e.attributes, "src")
		if href, ok := e.attributes["href"]; ok {
			assert.True(t, strings.HasPrefix(href, "#"))
		}
		for a := range e.attributes {
			assert.False(t, strings.HasPrefix(a, "on"), "handler %s", a)
		}
	}
}

// checkAccessible: one h1, no heading level skipped, a text for every picture, a
// caption for every table.
func checkAccessible(t *testing.T, all []element) {
	level, first := 0, 0
	for _, e := range all {
		switch e.name {
		case "html":
			assert.Equal(t, "en", e.attributes["lang"])
		case "h1", "h2", "h3", "h4":
			now := int(e.name[1] - '0')
			assert.LessOrEqual(t, now, level+1)
			level = now
			if now == 1 {
				first++
			}
			assert.NotEmpty(t, strings.TrimSpace(e.text))
		case "svg":
			if e.attributes["aria-hidden"] != "true" {
				assert.Equal(t, "img", e.attributes["role"])
				require.NotEmpty(t, e.children)
				assert.Equal(t, "title", e.children[0])
			}
		case "table":
			require.NotEmpty(t, e.children)
			assert.Equal(t, "caption", e.children[0])
		case "dl":
			assert.NotEmpty(t, e.children)
		}
	}
	assert.Equal(t, 1, first)
}
