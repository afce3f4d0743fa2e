package study

import (
	"errors"
	"strconv"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/tablefile"
)

// selectRows leaves only the rows that the slip asks for in the table, and
// says how many they are. It reports whether any is left.
func (l *loader) selectRows() bool {
	use := l.slip.Rows
	from, err1 := strconv.ParseFloat(use.From.Value, 64)
	to, err2 := strconv.ParseFloat(use.To.Value, 64)
	if err1 != nil || err2 != nil || from > to {
		l.tell(notice.New("rows-bounds", l.file, use.Column.Value, use.From.Value, use.To.Value))
		return false
	}
	part, err := l.table.Where(use.Column.Value, from, to)
	if errors.Is(err, tablefile.ErrNoRows) {
		l.tell(notice.New("rows-none", l.file, use.Column.Value, quantity.Typed(from), quantity.Typed(to)))
		return false
	}
	if err != nil {
		l.tell(asNotice(err))
		return false
	}
	l.tell(notice.New("rows-selected", part.Rows(), l.table.Rows(), l.file, use.Column.Value, quantity.Typed(from), quantity.Typed(to)))
	l.table = part
	return true
}
