package tablefile

import (
	"bytes"
	"fmt"
	"unicode/utf16"
	"unicode/utf8"

	"weirmark/core/notice"
)

// decode brings the text of a file into UTF-8 and reports whether it is text.
func (r *reader) decode(data []byte) bool {
	raw := data
	switch {
	case bytes.HasPrefix(data, []byte("\xef\xbb\xbf")):
		data = data[3:]
		r.add(notice.New("encoding-bom", "UTF-8").At(1))
	case bytes.HasPrefix(data, []byte("\xff\xfe")):
		data = fromUTF16(data[2:], 0, 1)
		r.add(notice.New("encoding-utf16", "low byte first"))
	case bytes.HasPrefix(data, []byte("\xfe\xff")):
		data = fromUTF16(data[2:], 1, 0)
		r.add(notice.New("encoding-utf16", "high byte first"))
	}
	data = bytes.TrimRight(data, "\x1a") // the old mark of an end of file
	if !isText(data) {
		r.file.Notices = nil
		r.refuse(notice.New("file-not-text", fmt.Sprintf("% x", raw[:min(8, len(raw))])))
		return false
	}
	if !utf8.Valid(data) {
		data = fromLatin1(data)
		r.add(notice.New("encoding-latin"))
	}
	r.data = data
	r.returns = bytes.IndexByte(data, '\r') >= 0
	return true
}

// isText reports whether data can be text: no zero bytes, few control bytes
// at the start, and not a document format that begins like a comment.
func isText(data []byte) bool {
	if bytes.IndexByte(data, 0) >= 0 || bytes.HasPrefix(data, []byte("%PDF-")) {
		return false
	}
	head := data[:min(4096, len(data))]
	controls := 0
	for _, c := range head {
		if c < ' ' && c != '\t' && c != '\n' && c != '\r' && c != '\f' && c != '\v' {
			controls++
		}
	}
	return controls*10 <= len(head)
}

// fromUTF16 converts two-byte units, low and high being the places of their
// bytes. An odd last byte becomes the replacement character.
func fromUTF16(data []byte, low, high int) []byte {
	units := make([]uint16, 0, len(data)/2)
	for i := 0; i+1 < len(data); i += 2 {
		units = append(units, uint16(data[i+low])|uint16(data[i+high])<<8)
	}
	text := make([]byte, 0, len(units)+len(units)/8)
	for _, c := range utf16.Decode(units) {
		text = utf8.AppendRune(text, c)
	}
	if len(data)%2 == 1 {
		text = utf8.AppendRune(text, utf8.RuneError)
	}
	return text
}

// fromLatin1 converts ISO 8859-1, in which a byte is a character.
func fromLatin1(data []byte) []byte {
	text := make([]byte, 0, len(data)+len(data)/16)
	for _, c := range data {
		text = utf8.AppendRune(text, rune(c))
	}
	return text
}
