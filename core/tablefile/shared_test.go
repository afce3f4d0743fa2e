package tablefile

import (
	"bytes"
	"io/fs"
	"math"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"weirmark/core/internal/reference"
	"weirmark/core/notice"
)

// sharedFiles is the number of table files in the shared folder of the NASA
// Turbulence Modeling Resource, published-gci.csv among them.
const sharedFiles = 61

var (
	plainLine = regexp.MustCompile(`^[-+0-9.eE \t]+$`)
	titleOf   = regexp.MustCompile(`(?i)t\s*=\s*"([^"]*)"`)
)

// zoneCount is what an independent look at a zoned file finds.
type zoneCount struct {
	names []string
	rows  []int
	words []int // numbers of the first row
}

// countZones walks lines with regular expressions, apart from the reader.
func countZones(data []byte) zoneCount {
	var c zoneCount
	open := false
	for line := range strings.Lines(string(data)) {
		line = strings.TrimSpace(line)
		lower := strings.ToLower(line)
		switch {
		case line == "" || line[0] == '#':
		case strings.HasPrefix(lower, "variables"):
			open = false
		case strings.HasPrefix(lower, "zone"):
			c.names, c.rows, c.words = append(c.names, titleOf.FindStringSubmatch(line)[1]), append(c.rows, 0), append(c.words, 0)
			open = true
		case plainLine.MatchString(line):
			if !open {
				c.names, c.rows, c.words = append(c.names, ""), append(c.rows, 0), append(c.words, 0)
				open = true
			}
			last := len(c.rows) - 1
			c.rows[last]++
			c.words[last] = len(strings.Fields(line))
		}
	}
	return c
}

// TestSharedFiles reads every table file of the NASA Turbulence Modeling
// Resource kept beside the repository and compares tables, names and rows with
// an independent count.
func TestSharedFiles(t *testing.T) {
	root := filepath.Join(reference.SharedDir(t), "nasa-tmr")
	files := 0
	err := filepath.WalkDir(root, func(path string, entry fs.DirEntry, err error) error {
		if err != nil || entry.IsDir() || strings.HasSuffix(path, ".md") {
			return err
		}
		files++
		data, err := os.ReadFile(path)
		if err != nil {
			return err
		}
		name, _ := filepath.Rel(root, path)
		t.Run(filepath.ToSlash(name), func(t *testing.T) {
			f := Read(name, data, Options{})
			checkFile(t, f, data)
			if notice.Any(f.Notices, notice.Stop) || notice.Any(f.Notices, notice.Ask) {
				t.Errorf("notices %v", f.Notices)
			}
			if !strings.HasSuffix(path, ".csv") {
				compareZones(t, f, countZones(data))
			}
		})
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	if files != sharedFiles {
		t.Errorf("%d files, want %d", files, sharedFiles)
	}
}

func compareZones(t *testing.T, f File, want zoneCount) {
	t.Helper()
	if len(f.Tables) != len(want.rows) || len(want.rows) == 0 {
		t.Fatalf("%d tables, want %d", len(f.Tables), len(want.rows))
	}
	for i, table := range f.Tables {
		if table.Name != strings.TrimSpace(want.names[i]) || table.Rows() != want.rows[i] || len(table.Columns) != want.words[i] {
			t.Errorf("table %d: %q with %d rows of %d columns, want %q with %d of %d", i,
				table.Name, table.Rows(), len(table.Columns), want.names[i], want.rows[i], want.words[i])
		}
		for _, c := range table.Columns {
			for row, v := range c.Values {
				if math.IsNaN(v) || math.IsInf(v, 0) {
					t.Errorf("table %d column %q row %d: %v", i, c.Name, row, v)
				}
			}
		}
	}
}

// TestSharedValues compares values, copied from the files as printed there.
func TestSharedValues(t *testing.T) {
	for _, c := range []struct {
		file, table, column string
		row, line           int
		want                float64
	}{
		{"flatplate/sa/cf_convergence.dat", "CFL3D", "C_f,x=0.97", 0, 4, 0.270562153e-2},
		{"flatplate/sa/cf_convergence.dat", "FUN3D", "N", 4, 14, 816},
		{"flatplate/sa/cf_convergence_fun3d_tri.dat", "", "h=sqrt(1/N)", 1, 4, 4.37588e-3},
		{"flatplate/theory/cf_K-S.dat", "", "cf", 0, 4, 0.00648403},
		{"flatplate/theory/effect_yplus.dat", "SA, CFL3D", "C_{f,x=1.5}", 5, 8, 0.258641737e-2},
		{"flatplate/sst-v/flatplate_u_sstv.dat", "x=     0.97008", "y", 2, 5, 0.100047e-5},
		{"naca0012/CLCD_Ladson_expdata.dat", "80 grit", "alpha", 2, 8, -.05},
		{"naca0012/CLCD_Ladson_expdata.dat", "120 grit", "cl", 3, 27, -.0122},
		{"naca0012/CLCD_Ladson_expdata.dat", "2", "alpha, deg", 0, 24, -4.01},
		{"backstep/cf.exp.dat", "", "error", 0, 4, .202e-3},
		{"backstep/profiles.exp.dat", "exp, x/H=-4", "VVV", 1, 10, 0.22},
		{"bump/sa-five-grids/fort.1000.grid0", "USM3D.grid0", "c2", 1, 3, 1.203132e-3},
		{"bump/sa/bump_u.dat", "x=0.75", "y-y0", 1, 4, 4.962086564e-7},
		{"bump/sst/force_convergence_sst.dat", "CFL3D", "c dp", 4, 8, 0.14787721313e-2},
		{"published-gci.csv", "", "phi1", 1, 7, 0.00270540472596778},
	} {
		f := Read(c.file, reference.Shared(t, "nasa-tmr/"+c.file), Options{})
		table, err := f.Table(c.table)
		if err != nil {
			t.Errorf("%s: %v", c.file, err)
			continue
		}
		column, err := table.Column(c.column)
		if err != nil {
			t.Errorf("%s: %v", c.file, err)
			continue
		}
		if got := column.Values[c.row]; got != c.want || table.RowLine(c.row) != c.line {
			t.Errorf("%s %q %q row %d: %v on line %d, want %v on line %d", c.file, c.table, c.column, c.row, got, table.RowLine(c.row), c.want, c.line)
		}
	}
}

// TestSharedUnits checks that the only units taken from names of these files
// are the degrees of "alpha, deg".
func TestSharedUnits(t *testing.T) {
	f := Read("polar", reference.Shared(t, "nasa-tmr/naca0012/n0012clcd_cfl3d_sa.dat"), Options{})
	column := f.Tables[0].Columns[0]
	if column.Name != "alpha" || column.Unit != "deg" || column.Header != "alpha, deg" {
		t.Errorf("%+v", column)
	}
	for _, name := range []string{"flatplate/sst-v/cf_convergence_sstv.dat", "flatplate/theory/effect_yplus.dat", "backstep/backstep_cfl3d_vel_sa.dat", "flatplate/sa/flatplate_u+y+.dat"} {
		for _, c := range Read(name, reference.Shared(t, "nasa-tmr/"+name), Options{}).Tables[0].Columns {
			if c.Unit != "" || c.Name != c.Header {
				t.Errorf("%s: %q became %q with unit %q", name, c.Header, c.Name, c.Unit)
			}
		}
	}
}

// TestSharedText checks the columns of labels of the published figures.
func TestSharedText(t *testing.T) {
	data := reference.Shared(t, "nasa-tmr/published-gci.csv")
	table, err := Read("gci", data, Options{}).Table("")
	if err != nil {
		t.Fatal(err)
	}
	rows := 0
	for _, line := range bytes.Split(data, []byte("\n")) {
		if len(line) > 0 && line[0] != '#' {
			rows++
		}
	}
	if rows--; table.Rows() != rows || rows < 70 {
		t.Errorf("%d rows, want %d", table.Rows(), rows)
	}
	for _, c := range []struct {
		column, want string
		row          int
	}{{"quantity", "C_f,x=0.97", 0}, {"code", "FUN3D, triangles", 4}, {"page", "flatplate_sst", 6}, {"gci_rule", "plain", 0}} {
		column, err := table.Column(c.column)
		if err != nil || column.Text[c.row] != c.want || !math.IsNaN(column.Values[c.row]) {
			t.Errorf("%s row %d: %v %v", c.column, c.row, column.Text[c.row], err)
		}
	}
	if column, _ := table.Column("N1"); column.Text != nil || column.Values[0] != 208896 {
		t.Errorf("N1: text %v, first %v", column.Text != nil, column.Values[0])
	}
}
