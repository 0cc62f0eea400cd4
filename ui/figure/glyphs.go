package figure

import "github.com/guptarohit/asciigraph"

// glyphSet is every character a text picture is made of. Each is one cell wide.
type glyphSet struct {
	bar, barLabelled    rune // vertical axis
	corner, floor, tick rune // horizontal axis
	zero                rune
	crest, haze, point  rune
	up, down            rune // marks beyond the upper and lower edge
	left, right         rune
	measured            rune // points of data, with their bars
	upright, across     rune
	lines               [3]asciigraph.CharSet // by Dash

	// A row with a bar: its mark, a cell of the bar, and half a cell at the end of
	// one left and right of zero.
	chosen, full, halfLeft, halfRight rune
}

var boxGlyphs = glyphSet{
	bar: '│', barLabelled: '┤', corner: '└', floor: '─', tick: '┬', zero: '╌',
	crest: '◆', haze: '○', point: '●', up: '▲', down: '▼', left: '←', right: '→',
	measured: '■', upright: '┃', across: '━',
	chosen: '▸', full: '█', halfLeft: '▐', halfRight: '▌',
	lines: [3]asciigraph.CharSet{
		Solid: {
			Horizontal: "─", VerticalLine: "│", ArcDownRight: "╭", ArcDownLeft: "╮", ArcUpRight: "╰", ArcUpLeft: "╯",
			EndCap: "─", StartCap: " ", UpRight: "└", DownHorizontal: "┬",
		},
		Dashed: {
			Horizontal: "╌", VerticalLine: "╎", ArcDownRight: "╭", ArcDownLeft: "╮", ArcUpRight: "╰", ArcUpLeft: "╯",
			EndCap: "╌", StartCap: " ", UpRight: "└", DownHorizontal: "┬",
		},
		Dotted: dots("·"),
	},
}

var asciiGlyphs = glyphSet{
	bar: '|', barLabelled: '+', corner: '+', floor: '-', tick: '+', zero: '-',
	crest: '#', haze: 'o', point: '@', up: '^', down: 'v', left: '<', right: '>',
	measured: 'X', upright: '!', across: '=',
	chosen: '>', full: '#', halfLeft: '-', halfRight: '-',
	lines: [3]asciigraph.CharSet{
		Solid: dots("*"),
		Dashed: {
			Horizontal: "-", VerticalLine: "|", ArcDownRight: ".", ArcDownLeft: ".", ArcUpRight: "'", ArcUpLeft: "'",
			EndCap: "-", StartCap: " ", UpRight: "+", DownHorizontal: "+",
		},
		Dotted: dots("."),
	},
}

func glyphsOf(st Style) glyphSet {
	if st.ASCII {
		return asciiGlyphs
	}
	return boxGlyphs
}

// lineGlyphs are the characters of the lines in both sets.
const lineGlyphs = "─│╭╮╰╯╌╎·*-|.'"

// dots is a character set of one character. The cell before a line's first
// point stays blank.
func dots(char string) asciigraph.CharSet {
	set := asciigraph.CreateCharSet(char)
	set.StartCap = " "
	return set
}
