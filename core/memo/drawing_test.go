package memo

import (
	"strings"
	"testing"
)

func TestDrawingKeepsWhatDraws(t *testing.T) {
	for _, row := range []struct{ name, in, want string }{
		{"ids", `<svg viewBox="0 0 4 4"><clipPath id="c"><rect width="1"/></clipPath><g clip-path="url(#c)"><use href="#c"/></g></svg>`,
			`<svg viewBox="0 0 4 4" xmlns="http://www.w3.org/2000/svg"><clipPath id="f-c"><rect width="1"></rect></clipPath><g clip-path="url(#f-c)"><use href="#f-c"></use></g></svg>`},
		{"size", `<svg width="640px" height="300"/>`, `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 640 300"></svg>`},
		{"text", `<svg viewBox="0 0 1 1"><text>a &lt; b &amp; "c"</text></svg>`, `<svg viewBox="0 0 1 1" xmlns="http://www.w3.org/2000/svg"><text>a &lt; b &amp; &#34;c&#34;</text></svg>`},
		{"script", `<svg viewBox="0 0 1 1"><script>x</script><g onclick="x" class="k"><foreignObject><g/><b>y</b></foreignObject><path d="M0 0"/></g></svg>`,
			`<svg viewBox="0 0 1 1" xmlns="http://www.w3.org/2000/svg"><g><path d="M0 0"></path></g></svg>`},
		{"outside", `<svg viewBox="0 0 1 1"><use href="http://x/y#z"/><rect fill="url(http://x)"/><rect style="fill:URL(x)"/><a href="#k"><rect/></a><image href="#i"/></svg>`,
			`<svg viewBox="0 0 1 1" xmlns="http://www.w3.org/2000/svg"><use></use><rect></rect><rect></rect></svg>`},
		{"quoted", `<svg viewBox="0 0 1 1"><rect fill="url('#a') none"/></svg>`, `<svg viewBox="0 0 1 1" xmlns="http://www.w3.org/2000/svg"><rect fill="url(#f-a) none"></rect></svg>`},
		{"head", `<?xml version="1.0"?><!-- made --><svg viewBox="0 0 1 1"/>`, `<svg viewBox="0 0 1 1" xmlns="http://www.w3.org/2000/svg"></svg>`},
	} {
		got, err := drawing(row.in, "f-")
		if err != nil || got != row.want {
			t.Errorf("%s: %v\n got %s\nwant %s", row.name, err, got, row.want)
		}
	}
}

func TestDrawingRefuses(t *testing.T) {
	for name, in := range map[string]string{
		"nothing": "", "text": "hello", "another element": "<g/>", "two": `<svg/><svg/>`, "unclosed": `<svg><g>`, "crossed": `<svg><g></svg></g>`, "attribute": `<svg a=b/>`,
	} {
		if got, err := drawing(in, "f-"); err == nil {
			t.Errorf("%s: no error, but %q", name, got)
		}
	}
	in := sample()
	in.Figures[2].SVG = `<svg><g>`
	page := parse(t, HTML(Document(in)))
	if content := page.all("figure")[0].content; !strings.Contains(content, "The figure is not shown: reading the drawing") || !strings.Contains(content, "Four intervals") {
		t.Errorf("a drawing that cannot be read is not named: %s", content)
	}
}
