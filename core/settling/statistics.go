package settling

import (
	"math"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// Stat is the mean of an unsteady record with its uncertainty. Numbers that
// the record does not give are NaN, and Rule says why.
type Stat struct {
	Rows        int        // behind the start-up, in even steps
	StartUp     int        // rows taken off as start-up
	Window      [2]float64 // At of the first and last row used
	Mean, SD    float64    // SD of one row, divisor n-1
	LagOne      float64    // autocorrelation of successive rows
	Tau         float64    // correlation time in At: step times the factor on the variance of the mean; with a cycle of the whole-cycle means
	Independent float64    // effective count of independent samples, of whole-cycle means where there is a cycle
	U           float64    // standard uncertainty of Mean
	Batch       Batch      // the same by batches, Count 0 where there are too few rows
	UMarkov     float64    // the same from LagOne alone, as if the rows were a first-order Markov series
	Period      float64    // in At, NaN where no cycle was found
	Cycles      int        // whole cycles in Window, 0 where no cycle was found
	Rule        string
	Notices     []notice.Notice
}

// Limits of the statistics. No source.
const (
	leastIndependent = 5  // at or below it no uncertainty is given
	fewIndependent   = 20 // below it the count is told
	mostBatches      = 20
	batchTimes       = 5 // correlation times a batch should hold
)

// Statistics averages s behind its start-up (see StartUp; the second half
// where the start-up cannot be told). Without a cycle
//
//	u^2 = s_n^2/(N_eff - 1), N_eff = n/tau,
//
// with s_n^2 the variance with divisor n and tau the correlation time; for
// independent rows this is s/sqrt(n). With a cycle the mean is that of whole
// cycles at the end of the record, and the same formula is used on the means
// of the fewest whole cycles that take eight rows. Rows need not be evenly
// spaced. A record shorter than its correlation time looks like one with a
// short one: no count of samples can tell. Cost n log n.
func Statistics(s Series, opt Options) Stat {
	r := newRecord(s, opt)
	from, ok := 0, true
	if !r.broken && len(r.y) >= leastRows {
		from, ok = r.begin(opt)
	}
	if rows := len(r.y) - from; r.broken || rows < leastRows {
		if !r.broken {
			r.tell("monitor-short", opt.name(), rows, leastRows)
		}
		st := noStat("fewer than 20 rows, or none at the end")
		st.Notices = r.notices
		return st
	}
	if !ok {
		r.tell("sampling-startup", opt.name())
	}
	from, period, _ := r.cycle(from, opt)
	st := average(r, from, period, opt)
	st.Notices = append(r.notices, st.Notices...)
	return st
}

func noStat(why string) Stat {
	nan := math.NaN()
	return Stat{
		Window: [2]float64{nan, nan}, Mean: nan, SD: nan, LagOne: nan, Tau: nan, Independent: nan,
		U: nan, UMarkov: nan, Period: nan, Rule: "no mean: " + why,
	}
}

// average is the statistic of the rows of r from row from on, with the period
// in rows, 0 for none.
func average(r record, from int, period float64, opt Options) Stat {
	st := noStat("")
	st.StartUp, st.Rule = from, "mean behind "+opt.startWords()+"; u from the correlation time"
	y := r.y[from:]
	samples, width := y, 1.
	if period > 0 {
		c := cycleOf(y, period)
		y = y[len(y)-c.length:]
		st.Period, st.Cycles = period*r.step, c.count
		width = min(unit(period), float64(len(y)))
		samples = unitMeans(y, width)
		st.Rule = "mean over whole cycles behind " + opt.startWords() + "; u from the correlation time of their means"
		if opt.Period > 0 {
			st.Rule = "mean over whole cycles of the declared period; u from the correlation time of their means"
		}
	}
	st.Rows = len(y)
	st.Window = [2]float64{r.at(len(r.y) - len(y)), r.at(len(r.y) - 1)}
	st.Mean, st.SD = spread(y)
	if period > 0 {
		st.Mean = mean(samples)
	}
	st.LagOne = LagOne(y)
	var tau float64
	st.U, tau, st.Independent = standardOfMean(samples)
	st.Tau = tau * width * r.step
	count := min(int(float64(len(samples))/(batchTimes*max(tau, 1))), mostBatches)
	if count < 4 {
		count = min(4, len(samples)/2)
	}
	if b, ok := BatchMeans(samples, count); ok {
		st.Batch = b
	}
	if rho := st.LagOne; period == 0 && math.Abs(rho) < 1 {
		_, factor := MarkovFactor(rho, len(y))
		st.UMarkov = st.SD * math.Sqrt(max(factor, 0)/float64(len(y)))
	}
	st.judgeSampling(opt)
	return st
}

// standardOfMean returns the standard uncertainty of the mean of y, NaN where
// y holds no more than five independent values, the correlation time in rows
// and the count of independent values.
func standardOfMean(y []float64) (u, tau, independent float64) {
	n := float64(len(y))
	tau = correlationTime(y)
	independent = n / tau
	if independent <= leastIndependent {
		return math.NaN(), tau, independent
	}
	_, sd := spread(y)
	return sd * math.Sqrt((n-1)/n/(independent-1)), tau, independent
}

func (st *Stat) judgeSampling(opt Options) {
	if math.IsNaN(st.U) {
		st.Rule = "no uncertainty of the mean: too few independent samples"
		st.Notices = append(st.Notices, notice.New("sampling-none", quantity.Text(quantity.Round(st.Independent, 10), 2), opt.name()))
		return
	}
	if n, short := st.Short(opt.name(), quantity.Text(st.U, 2), opt.UNum); short {
		st.Notices = append(st.Notices, n)
	}
}

// Short returns the notice of an average over few independent samples, or of
// one whose uncertainty is more than half of u_num, which holds it (0 or NaN:
// not known). Shown is U as the notice prints it.
func (st Stat) Short(name, shown string, uNum float64) (n notice.Notice, short bool) {
	count := quantity.Round(st.Independent, 10)
	share := "u_num is not known"
	if uNum > 0 {
		share = quantity.Text(100*st.U/uNum, 2) + " % of u_num"
	}
	short = count < fewIndependent || quantity.Round(st.U, 10) > quantity.Round(uNum/2, 10) && uNum > 0
	return notice.New("sampling-short", quantity.Text(count, 2), name, shown, share), short
}
