package pdf

import (
	"bytes"
	"compress/zlib"
	"crypto/md5"
	"crypto/sha256"
	"encoding/xml"
	"errors"
	"fmt"
	"regexp"
	"strconv"
	"strings"
	"time"
	"unicode/utf16"
)

// Attachment is a file that rides along with the document.
type Attachment struct {
	Name         string // plain ASCII file name
	MIME         string
	Description  string
	Relationship string // "Source" or "Data" (ISO 32000-2, 7.11.3)
	Data         []byte
}

// update appends objects to a finished file (ISO 32000-1, 7.5.6). Nothing
// already written moves, so bookmarks and links stay right.
type update struct {
	buf     *bytes.Buffer
	next    int         // number of the next new object
	offsets map[int]int // of the objects of this update
	order   []int
}

var (
	trailerSize = regexp.MustCompile(`/Size (\d+)\n/Root (\d+) 0 R\n/Info (\d+) 0 R\n`)
	startXref   = regexp.MustCompile(`startxref\n(\d+)\n%%EOF\s*$`)
	outlineRoot = regexp.MustCompile(`/Outlines (\d+) 0 R`)
)

// attach completes the file of the PDF library: attachments, metadata,
// language, the title in the window bar and a file identifier.
func attach(base []byte, info Info, files []Attachment) ([]byte, error) {
	tr := trailerSize.FindAllSubmatch(base, -1)
	sx := startXref.FindSubmatch(base)
	if len(tr) == 0 || sx == nil {
		return nil, errors.New("the pages end without a trailer")
	}
	last := tr[len(tr)-1]
	size, _ := strconv.Atoi(string(last[1]))
	root, _ := strconv.Atoi(string(last[2]))
	u := &update{buf: bytes.NewBuffer(bytes.Clone(base)), next: size, offsets: map[int]int{}}
	specs := make([]int, len(files))
	for i, f := range files {
		specs[i] = u.file(f, info.Date)
	}
	meta := u.stream("/Type /Metadata /Subtype /XML", xmp(info), false)
	u.object(root, catalog(base, files, specs, meta, info.Lang))
	u.close(string(last[3]), root, string(sx[1]), identifier(base, info, files))
	return u.buf.Bytes(), nil
}

func (u *update) add(body string) int {
	n := u.next
	u.next++
	u.object(n, body)
	return n
}

func (u *update) object(n int, body string) {
	u.offsets[n] = u.buf.Len()
	u.order = append(u.order, n)
	fmt.Fprintf(u.buf, "%d 0 obj\n%s\nendobj\n", n, body)
}

func (u *update) stream(dict string, data []byte, pack bool) int {
	if pack {
		var z bytes.Buffer
		w := zlib.NewWriter(&z)
		_, _ = w.Write(data) // a bytes.Buffer does not fail
		_ = w.Close()
		data, dict = z.Bytes(), dict+" /Filter /FlateDecode"
	}
	return u.add(fmt.Sprintf("<<%s /Length %d>>\nstream\n%s\nendstream", dict, len(data), data))
}

func (u *update) file(f Attachment, when time.Time) int {
	sum := md5.Sum(f.Data) // the format asks for this sum; it protects nothing
	stamp := "(D:" + when.Format("20060102150405") + "Z)"
	ef := u.stream(fmt.Sprintf("/Type /EmbeddedFile /Subtype /%s /Params <</Size %d /CreationDate %s /ModDate %s /CheckSum <%x>>>",
		pdfName(f.MIME), len(f.Data), stamp, stamp, sum), f.Data, true)
	return u.add(fmt.Sprintf("<</Type /Filespec /F %s /UF %s /Desc %s /AFRelationship /%s /EF <</F %d 0 R /UF %d 0 R>>>>",
		pdfText(f.Name), pdfText(f.Name), pdfText(f.Description), pdfName(f.Relationship), ef, ef))
}

// catalog is the root of the document, written anew with what the library
// does not know.
func catalog(base []byte, files []Attachment, specs []int, meta int, lang string) string {
	if lang == "" {
		lang = "en"
	}
	var b strings.Builder
	fmt.Fprintf(&b, "<</Type /Catalog /Version /1.7 /Pages 1 0 R /Lang %s /ViewerPreferences <</DisplayDocTitle true>> /Metadata %d 0 R",
		pdfText(lang), meta)
	if m := outlineRoot.FindAllSubmatch(base, -1); len(m) > 0 {
		fmt.Fprintf(&b, " /Outlines %s 0 R /PageMode /UseOutlines", m[len(m)-1][1])
	}
	if len(files) > 0 {
		b.WriteString(" /AF [")
		for _, n := range specs {
			fmt.Fprintf(&b, "%d 0 R ", n)
		}
		b.WriteString("] /Names <</EmbeddedFiles <</Names [")
		for _, i := range byName(files) {
			fmt.Fprintf(&b, "%s %d 0 R ", pdfText(files[i].Name), specs[i])
		}
		b.WriteString("]>>>>")
	}
	b.WriteString(">>")
	return b.String()
}

// byName is the order of a name tree.
func byName(files []Attachment) []int {
	order := make([]int, len(files))
	for i := range order {
		order[i] = i
		for j := i; j > 0 && files[order[j]].Name < files[order[j-1]].Name; j-- {
			order[j], order[j-1] = order[j-1], order[j]
		}
	}
	return order
}

func (u *update) close(infoRef string, root int, prev string, id [32]byte) {
	at := u.buf.Len()
	u.buf.WriteString("xref\n")
	for _, n := range u.order {
		fmt.Fprintf(u.buf, "%d 1\n%010d 00000 n \n", n, u.offsets[n])
	}
	fmt.Fprintf(u.buf, "trailer\n<</Size %d /Root %d 0 R /Info %s 0 R /Prev %s /ID [<%x> <%x>]>>\nstartxref\n%d\n%%%%EOF\n",
		u.next, root, infoRef, prev, id[:16], id[:16], at)
}

// identifier names the file by its content.
func identifier(base []byte, info Info, files []Attachment) [32]byte {
	h := sha256.New()
	h.Write(base)
	fmt.Fprintf(h, "%q %q", info.Title, info.Lang)
	for _, f := range files {
		fmt.Fprintf(h, "%q %d ", f.Name, len(f.Data))
		h.Write(f.Data)
	}
	return [32]byte(h.Sum(nil))
}

// pdfName escapes a name object.
func pdfName(s string) string {
	var b strings.Builder
	for i := range len(s) {
		c := s[i]
		if c >= 'A' && c <= 'Z' || c >= 'a' && c <= 'z' || c >= '0' && c <= '9' || c == '-' || c == '.' {
			b.WriteByte(c)
			continue
		}
		fmt.Fprintf(&b, "#%02x", c)
	}
	return b.String()
}

// pdfText is a text string: plain where it can be, else UTF-16 in hex.
func pdfText(s string) string {
	if plain(s) {
		return "(" + strings.NewReplacer(`\`, `\\`, `(`, `\(`, `)`, `\)`).Replace(s) + ")"
	}
	var b strings.Builder
	b.WriteString("<FEFF")
	for _, u := range utf16.Encode([]rune(s)) {
		fmt.Fprintf(&b, "%04X", u)
	}
	return b.String() + ">"
}

// xmp is the metadata packet (ISO 16684-1) with the same facts as the
// document information.
func xmp(info Info) []byte {
	esc := func(s string) string {
		var b bytes.Buffer
		_ = xml.EscapeText(&b, []byte(strings.ToValidUTF8(s, shown)))
		return b.String()
	}
	lang := info.Lang
	if lang == "" {
		lang = "en"
	}
	when := info.Date.Format("2006-01-02T15:04:05Z")
	return fmt.Appendf(nil, `<?xpacket begin="`+"\ufeff"+`" id="W5M0MpCehiHzreSzNTczkc9d"?>
<x:xmpmeta xmlns:x="adobe:ns:meta/"><rdf:RDF xmlns:rdf="http://www.w3.org/1999/02/22-rdf-syntax-ns#">
<rdf:Description rdf:about="" xmlns:dc="http://purl.org/dc/elements/1.1/" xmlns:xmp="http://ns.adobe.com/xap/1.0/" xmlns:pdf="http://ns.adobe.com/pdf/1.3/">
<dc:format>application/pdf</dc:format>
<dc:title><rdf:Alt><rdf:li xml:lang="x-default">%s</rdf:li></rdf:Alt></dc:title>
<dc:creator><rdf:Seq><rdf:li>%s</rdf:li></rdf:Seq></dc:creator>
<dc:description><rdf:Alt><rdf:li xml:lang="x-default">%s</rdf:li></rdf:Alt></dc:description>
<dc:language><rdf:Bag><rdf:li>%s</rdf:li></rdf:Bag></dc:language>
<xmp:CreateDate>%s</xmp:CreateDate><xmp:ModifyDate>%s</xmp:ModifyDate><pdf:Producer>%s</pdf:Producer>
</rdf:Description></rdf:RDF></x:xmpmeta>
<?xpacket end="r"?>`, esc(info.Title), esc(info.Author), esc(info.Subject), esc(lang), when, when, esc(info.Producer))
}
