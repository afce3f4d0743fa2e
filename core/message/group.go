package message

import (
	"strconv"
	"strings"

	"weirmark/core/study"
	"weirmark/core/tablefile"
)

// group puts the cards of tables of one shape together: the same role and the
// same number of columns. A table whose columns differ from those of most in
// its group says so.
func group(cards []SlipCard, slips []*study.Slip, tables []tablefile.Table) {
	members := map[string][]int{}
	for i, p := range slips {
		if p.Role.Value == study.Unused {
			continue
		}
		key := p.Role.Value + " " + strconv.Itoa(len(tables[i].Columns))
		cards[i].Group = key
		members[key] = append(members[key], i)
	}
	for _, list := range members { // each sets cards of its own
		count := map[string]int{}
		usual := ""
		for _, i := range list {
			text := columnsText(tables[i])
			count[text]++
			if count[text] > count[usual] || count[text] == count[usual] && text < usual {
				usual = text
			}
		}
		if 2*count[usual] <= len(list) {
			continue
		}
		for _, i := range list {
			if text := columnsText(tables[i]); text != usual {
				cards[i].Odd = "Its columns are " + text + "; those of " + strconv.Itoa(count[usual]) + " like tables are " + usual + "."
			}
		}
	}
}

// columnsText names the columns with their units, in their order.
func columnsText(t tablefile.Table) string {
	names := make([]string, len(t.Columns))
	for i, c := range t.Columns {
		names[i] = c.Name
		if c.Unit != "" {
			names[i] += " [" + c.Unit + "]"
		}
	}
	return strings.Join(names, ", ")
}

// like lists the slips that a slip's reading can be taken over for: of its
// group, with open entries, and with the usual columns.
func (s *Session) like(id string) []string {
	cards := s.slipCards()
	var own *SlipCard
	for i := range cards {
		if cards[i].ID == id {
			own = &cards[i]
		}
	}
	if own == nil || own.Group == "" || own.Odd != "" {
		return nil
	}
	var others []string
	for _, c := range cards {
		if c.ID != id && c.Group == own.Group && c.Odd == "" && c.Open > 0 {
			others = append(others, c.ID)
		}
	}
	return others
}
