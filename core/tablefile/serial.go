package tablefile

import (
	"fmt"
	"math"
	"strings"
)

// isDateFormat reports whether a number format of a workbook shows a date or
// a time: outside quotes and brackets it has a letter for a year, month, day,
// hour or second. Formats of time spans, such as [h]:mm, are among them.
func isDateFormat(format string) bool {
	lower := strings.ToLower(format)
	for _, span := range []string{"[h", "[m", "[s"} {
		if strings.Contains(lower, span) {
			return true
		}
	}
	for i := 0; i < len(lower); i++ {
		switch lower[i] {
		case '"', '[':
			shut := byte('"')
			if lower[i] == '[' {
				shut = ']'
			}
			n := strings.IndexByte(lower[i+1:], shut)
			if n < 0 {
				return false
			}
			i += n + 1
		case '\\', '_', '*':
			i++
		case 'g': // the word General, which has an e
			if strings.HasPrefix(lower[i:], "general") {
				i += len("general") - 1
			}
		case 'd', 'm', 'y', 'h', 's':
			return true
		}
	}
	return false
}

// isDateNumber reports whether a number format that workbooks refer to by
// number alone shows a date or a time (ECMA-376-1, 18.8.30, with the
// numbers 27 to 36 and 50 to 58 of East Asian languages; from memory).
func isDateNumber(id int) bool {
	return id >= 14 && id <= 22 || id >= 27 && id <= 36 || id >= 45 && id <= 47 || id >= 50 && id <= 58
}

// serialText writes a date of a workbook: days since the end of 1899, in which
// 1900 counts as a leap year, or since 1 January 1904 (ECMA-376-1,
// 18.17.4; from memory). Numbers below one day are a time of day.
func serialText(serial float64, since1904 bool) string {
	if math.IsNaN(serial) || serial < 0 || serial > 2958466 {
		return fmt.Sprintf("date number %g", serial)
	}
	day := int(math.Floor(serial))
	seconds := int(math.Round((serial - float64(day)) * 86400))
	if seconds == 86400 {
		day, seconds = day+1, 0
	}
	clock := fmt.Sprintf("%02d:%02d:%02d", seconds/3600, seconds/60%60, seconds%60)
	if day == 0 && !since1904 {
		return clock
	}
	if !since1904 && day == 60 {
		return "1900-02-29" // a day that workbooks count and never was
	}
	switch {
	case since1904:
		day += 1462 // 1 January 1904 in the other count
	case day < 60:
		day++
	}
	year, month, of := civil(day - 25569) // 1 January 1970 in the other count
	date := fmt.Sprintf("%04d-%02d-%02d", year, month, of)
	if seconds == 0 {
		return date
	}
	return date + " " + clock
}

// civil returns the date in the Gregorian calendar that is days days after
// 1 January 1970. Years are counted from March, so that the day put in by
// leap years is the last, in eras of 400 years (a common count, from memory).
func civil(days int) (year, month, day int) {
	days += 719468 // since 1 March of the year 0
	era := days / 146097
	of := days % 146097
	yearOfEra := (of - of/1460 + of/36524 - of/146096) / 365
	dayOfYear := of - (365*yearOfEra + yearOfEra/4 - yearOfEra/100)
	m := (5*dayOfYear + 2) / 153
	day = dayOfYear - (153*m+2)/5 + 1
	year, month = era*400+yearOfEra, m+3
	if month > 12 {
		year, month = year+1, month-12
	}
	return year, month, day
}
