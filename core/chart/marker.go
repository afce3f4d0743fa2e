package chart

import (
	"strconv"
	"strings"
)

// marker is a closed outline around the origin; its size is 10 px.
type marker [][2]float64

var (
	triangle  = marker{{0, -5}, {5, 4}, {-5, 4}}
	pointDown = marker{{0, 5}, {5, -4}, {-5, -4}}
	square    = marker{{-4, -4}, {4, -4}, {4, 4}, {-4, 4}}
	diamond   = marker{{0, -5.5}, {5.5, 0}, {0, 5.5}, {-5.5, 0}}
	star      = marker{{0, -6}, {1.5, -1.5}, {6, 0}, {1.5, 1.5}, {0, 6}, {-1.5, 1.5}, {-6, 0}, {-1.5, -1.5}}
	bar       = marker{{-5, -1.5}, {5, -1.5}, {5, 1.5}, {-5, 1.5}}
	plus      = marker{{-1, -5}, {1, -5}, {1, -1}, {5, -1}, {5, 1}, {1, 1}, {1, 5}, {-1, 5}, {-1, 1}, {-5, 1}, {-5, -1}, {-1, -1}}
	hourglass = marker{{-4.5, -5}, {4.5, -5}, {-4.5, 5}, {4.5, 5}}
)

// disc is the symbol of measured values.
const disc = "circle"

// symbol returns the marker as the symbol of a series.
func (m marker) symbol() string { return "path://" + m.at(0, 0) }

// Size of a key of a legend in px.
const (
	keyWidth  = 28
	keyHeight = 12
)

// room keeps a key at its size: the library stretches a path to the whole key.
const room = "path://M0 0h.01v.01zM27.99 11.99h.01v.01z"

// key returns the marker as the key of a legend.
func (m marker) key() string { return room + m.at(keyWidth/2, keyHeight/2) }

func (m marker) at(x, y float64) string {
	var b strings.Builder
	for i, p := range m {
		b.WriteString([]string{"M", "L"}[min(i, 1)])
		b.WriteString(coordinate(p[0]+x) + " " + coordinate(p[1]+y))
	}
	return b.String() + "z"
}

func coordinate(v float64) string { return strconv.FormatFloat(v, 'f', -1, 64) }

// lineKey returns a line of a pattern as the key of a legend.
func lineKey(dash []int) string {
	if dash == nil {
		return room + "M0 5.1h28v1.8h-28z"
	}
	var b strings.Builder
	b.WriteString(room)
	for x, i := 0, 0; x < keyWidth; i++ {
		n := dash[i%len(dash)]
		if i%2 == 0 {
			n = min(n, keyWidth-x)
			b.WriteString("M" + strconv.Itoa(x) + " 5.2h" + strconv.Itoa(n) + "v1.6h-" + strconv.Itoa(n) + "z")
		}
		x += n
	}
	return b.String()
}

// Other keys: an area, a disc, a disc with an upright bar, an upright bar, and
// lying bars of an interval.
const (
	bandKey    = "path://M0 0h28v12h-28z"
	discKey    = room + "M11 6a3 3 0 1 1 6 0a3 3 0 1 1 -6 0z"
	barredKey  = room + "M11 0h6v1h-2.5v2h-1v-2h-2.5zM11 12h6v-1h-2.5v-2h-1v2h-2.5zM11 6a3 3 0 1 1 6 0a3 3 0 1 1 -6 0z"
	uprightKey = room + "M11 0h6v1h-2.5v10h2.5v1h-6v-1h2.5v-10h-2.5z"
	thickKey   = room + "M0 3h28v6h-28z"
	thinKey    = room + "M0 1h1.4v4.2h25.2v-4.2h1.4v10h-1.4v-4.2h-25.2v4.2h-1.4z"
)
