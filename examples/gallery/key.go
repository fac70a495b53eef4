package main

import (
	"errors"
	"html/template"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/snake"
)

// keyItem explains one mark of the pictures.
type keyItem struct {
	Mark template.HTML
	Text string
}

// newKey explains the marks with pictures of a single tile.
func newKey() ([]keyItem, error) {
	minimal, errMinimal := snake.ParseMatching("0")
	maximal, errMaximal := snake.ParseMatching("1")
	if err := errors.Join(errMinimal, errMaximal); err != nil {
		return nil, err
	}
	var key []keyItem
	for _, mark := range []struct {
		diagonal snake.Label
		matching *snake.Matching
		text     string
	}{
		{orbifold.LabelOf(farey.Zero), nil, "crossing of a horizontal edge, class of 0/1"},
		{orbifold.LabelOf(farey.Infinity), nil, "crossing of a vertical edge, class of 1/0"},
		{orbifold.LabelOf(farey.One), nil, "crossing of a diagonal edge, class of 1/1"},
		{snake.NoLabel, &minimal, "a tile with two edges of the matching, thick, that can be flipped"},
		{snake.NoLabel, &maximal, "the same tile flipped, hatched"},
	} {
		tile := snake.NewBuilder(mark.diagonal, snake.NoLabel, snake.NoLabel).Graph(snake.NoLabel, snake.NoLabel)
		svg, err := tile.SVG(snake.Drawing{Name: labelSign, Matching: mark.matching})
		if err != nil {
			return nil, err
		}
		key = append(key, keyItem{template.HTML(svg), mark.text})
	}
	return key, nil
}
