package tablefile

import "testing"

func TestIsDate(t *testing.T) {
	for _, text := range []string{
		"3/2", "31/12", "12/31", "3/2/24", "03/02/2024", "2-Mar", "2-mar-24", "Mar-02", "Mar 24", "2. Mrz", "2 March 2024", "March 2, 2024",
		"2.3.2024", "02.03.24", "2.3.", "2024-03-02", "2024/03/02", "2024-03-02 12:30:00", "2024-03-02T12:30Z", "12:30", "12:30:15.5", "1.Dez", "4-déc",
	} {
		if !isDate([]byte(text)) {
			t.Errorf("%q is a date", text)
		}
	}
	for _, text := range []string{
		"", "3", "3.2", "3-2", "3,2", "3/", "/2", "13/32", "0/5", "3/2/1/1", "32.13.2024", "1.2.3", "may", "mark-2", "P-7", "a/b", "1/2 h", "2-March-x",
		"99:99:99:99", "1:2", "12:3", "x 12:30", "12-345", "2024-3", "10.1.500", "0.5/0.2",
	} {
		if isDate([]byte(text)) {
			t.Errorf("%q is no date", text)
		}
	}
}

// TestSerialText holds days of both date systems. The numbers of whole days
// and of 2 March 2024, 18:00, are those of openpyxl.utils.datetime.to_excel
// (openpyxl 3.0.9); day 60 and what is out of range follow ECMA-376-1, 18.17.4
// (from memory).
func TestSerialText(t *testing.T) {
	for _, c := range []struct {
		serial float64
		since  bool
		want   string
	}{
		{0.5, false, "12:00:00"},
		{1, false, "1900-01-01"},
		{59, false, "1900-02-28"},
		{60, false, "1900-02-29"},
		{61, false, "1900-03-01"},
		{36526, false, "2000-01-01"},
		{36585, false, "2000-02-29"},
		{36586, false, "2000-03-01"},
		{45353, false, "2024-03-02"},
		{45353.75, false, "2024-03-02 18:00:00"},
		{45352.999999999, false, "2024-03-02"},
		{0, true, "1904-01-01"},
		{43891, true, "2024-03-02"},
		{2958465, false, "9999-12-31"},
		{-1, false, "date number -1"},
		{1e9, false, "date number 1e+09"},
	} {
		if got := serialText(c.serial, c.since); got != c.want {
			t.Errorf("%v (1904 %v): %s, want %s", c.serial, c.since, got, c.want)
		}
	}
}

func TestIsDateFormat(t *testing.T) {
	for _, format := range []string{"d. mmm", "yyyy\\-mm\\-dd", "[$-407]d/m/yy;@", "h:mm AM/PM", "[h]:mm", "mm:ss.0", `"t = "ss`} {
		if !isDateFormat(format) {
			t.Errorf("%q shows a date", format)
		}
	}
	for _, format := range []string{"General", "0.00", "#,##0", "0.00E+00", `0.0"m/s"`, "[Red]0", `0\d`, "_d0", "0%", `0"open`, "@"} {
		if isDateFormat(format) {
			t.Errorf("%q shows no date", format)
		}
	}
}
