package network

// Result is what a run gives back: SI units, unit in the key, stable names (format version 1). Maps are written with sorted keys; Order holds the
// order of the file for people. Moments that never came are nil.
type Result struct {
	Schema      int                        `json:"schema"`
	Command     string                     `json:"command"`
	Program     Program                    `json:"program"`
	Scenario    Scenario                   `json:"scenario"`
	Verdict     Verdict                    `json:"verdict"`
	ExitCode    int                        `json:"exit_code"`
	Complete    bool                       `json:"complete"`
	End         float64                    `json:"end_s"`
	Stopped     string                     `json:"stopped_because"` // time | at_rest | interrupted | failed
	Trouble     string                     `json:"trouble,omitempty"`
	Vessels     map[string]*VesselResult   `json:"vessels"`
	Lines       map[string]*LineResult     `json:"lines"`
	Outside     map[string]*OutsideResult  `json:"outside"`
	Pumps       map[string]*PumpResult     `json:"pumps"`
	Steps       []*StepResult              `json:"steps"`
	Holds       []*HoldResult              `json:"holds"`
	Milestones  []*MilestoneResult         `json:"milestones"`
	Limits      []*LimitResult             `json:"limits"`
	Alarms      []*AlarmResult             `json:"alarms"`
	Flags       []*Flag                    `json:"flags"`
	Bands       map[string]map[string]Band `json:"bands"`
	Assumptions []Assumption               `json:"assumptions"`
	Cautions    []string                   `json:"cautions"`
	LineUp      []LineUpRow                `json:"line_up"`
	Handover    []*HandoverBlock           `json:"handover"`
	Balance     Balance                    `json:"balance"`
	Work        Work                       `json:"work"`
	Series      *Series                    `json:"series"`
	SeriesBand  *SeriesBand                `json:"series_band"`
	Allowance   Allowance                  `json:"allowance"`

	unreached []string // steps that are not optional and never came
}

// Verdict answers "can this sequence run as written".
type Verdict string

const (
	Run       Verdict = "run"
	DoNotRun  Verdict = "do_not_run"
	TooClose  Verdict = "too_close"
	NotJudged Verdict = "not_judged"
	Holds     Verdict = "holds" // of one limit
	Fails     Verdict = "fails"
)

// Allowance tells what doubts the verdict allows for.
type Allowance struct {
	Doubts  string `json:"doubts"` // default | stated | none
	Samples int    `json:"samples"`
	Seed    int64  `json:"seed"`
}

type Program struct {
	Name    string `json:"name"`
	Version string `json:"version"`
}

type Scenario struct {
	Title    string  `json:"title"`
	Revision string  `json:"revision"`
	File     string  `json:"file"`
	SHA256   string  `json:"sha256"`
	Case     *string `json:"case"`
	Start    *string `json:"start"` // 2027-10-09T06:00:00 local
}

type VesselResult struct {
	StartLevel   float64    `json:"start_level_m"`
	EndLevel     float64    `json:"end_level_m"`
	StartVolume  float64    `json:"start_volume_m3"`
	EndVolume    float64    `json:"end_volume_m3"`
	Left         float64    `json:"left_m3"`
	LeftWhy      string     `json:"left_why"`
	PeakLevel    float64    `json:"peak_level_m"`
	PeakAt       float64    `json:"peak_at_s"`
	LowLevel     float64    `json:"low_level_m"`
	LowAt        float64    `json:"low_at_s"`
	HeadroomTo   Headroom   `json:"headroom_to"`
	EmptyAtLevel *float64   `json:"empty_at_m"`
	EmptiedAt    *float64   `json:"emptied_at_s"`
	In           float64    `json:"in_m3"`
	Out          float64    `json:"out_m3"`
	Spilled      float64    `json:"spilled_m3"`
	PeakSpill    float64    `json:"peak_spill_m3_s"`
	FirstSpill   *float64   `json:"first_spill_at_s"`
	SpillEnds    *float64   `json:"spill_ends_at_s"`
	Gas          *GasResult `json:"gas"`
}

// Headroom is the vertical distance, m, from the peak level up to a named height; negative when passed; nil when there is none.
type Headroom struct {
	Alarm *float64 `json:"alarm_m"`
	Sill  *float64 `json:"sill_m"`
	Rim   *float64 `json:"rim_m"`
}

type GasResult struct {
	Low           float64  `json:"low_pa_g"`
	LowAt         float64  `json:"low_at_s"`
	High          float64  `json:"high_pa_g"`
	HighAt        float64  `json:"high_at_s"`
	LowAdiabatic  *float64 `json:"low_adiabatic_pa_g"`
	HighAdiabatic *float64 `json:"high_adiabatic_pa_g"`
}

type LineResult struct {
	Forward      float64    `json:"forward_m3"`
	Backward     float64    `json:"backward_m3"`
	PeakFlow     float64    `json:"peak_flow_m3_s"`
	PeakFlowAt   float64    `json:"peak_flow_at_s"`
	LowFlow      float64    `json:"low_flow_m3_s"`
	LowFlowAt    float64    `json:"low_flow_at_s"`
	PeakVelocity float64    `json:"peak_velocity_m_s"`
	CrestLow     *float64   `json:"crest_low_m"`
	CrestLowAt   *float64   `json:"crest_low_at_s"`
	RunsBackward []Reversal `json:"runs_backward"`
	Holds        float64    `json:"holds_m3"`
}

type Reversal struct {
	From   float64 `json:"from_s"`
	To     float64 `json:"to_s"`
	Volume float64 `json:"volume_m3"`
	Peak   float64 `json:"peak_flow_m3_s"`
}

type OutsideResult struct {
	Received     float64 `json:"received_m3"`
	Supplied     float64 `json:"supplied_m3"`
	PeakFlow     float64 `json:"peak_flow_m3_s"`
	PeakFlowAt   float64 `json:"peak_flow_at_s"`
	OverCapacity float64 `json:"over_capacity_m3"`
}

type PumpResult struct {
	Starts     int     `json:"starts"`
	Ran        float64 `json:"ran_s"`
	MostInHour int     `json:"most_starts_in_an_hour"`
}

type StepResult struct {
	ID      string             `json:"id"`
	Says    string             `json:"says"`
	Who     string             `json:"who"`
	Note    string             `json:"note"`
	Due     *float64           `json:"due_at_s"`
	Done    *float64           `json:"done_at_s"`
	MovedBy *float64           `json:"moved_by_at_s"`
	Clock   *string            `json:"clock"`
	Levels  map[string]float64 `json:"levels_m"`
	Flows   map[string]float64 `json:"flows_m3_s"`
	Expect  *Expect            `json:"expect"`
	StopIf  string             `json:"stop_if"`
	Where   string             `json:"where"`
	Turns   *float64           `json:"turns"`
}

// Expect is a reading to be expected at a time: low and high from the doubts, equal to mid without.
type Expect struct {
	Read string  `json:"read"`
	At   float64 `json:"at_s"`
	Low  float64 `json:"low_m"`
	Mid  float64 `json:"mid_m"`
	High float64 `json:"high_m"`
}

type HoldResult struct {
	ID          string   `json:"id"`
	Says        string   `json:"says"`
	Who         string   `json:"who"`
	At          *float64 `json:"at_s"`
	UpTo        float64  `json:"up_to_s"`
	LongestWait *float64 `json:"longest_wait_s"`
}

type MilestoneResult struct {
	Name string   `json:"name"`
	At   *float64 `json:"at_s"`
}

type LimitResult struct {
	ID         int         `json:"id"`
	Subject    string      `json:"subject"`
	Of         []string    `json:"of"`
	Bound      string      `json:"bound"`
	BoundSI    *float64    `json:"bound_si"`
	UnitSI     string      `json:"unit_si"`
	AsWritten  string      `json:"as_written"`
	Says       string      `json:"says"` // "level of SUMP below 1.9 m"
	Window     [2]*float64 `json:"window_s"`
	Verdict    Verdict     `json:"verdict"`
	Worst      *float64    `json:"worst_si"`
	WorstAt    *float64    `json:"worst_at_s"`
	Margin     *float64    `json:"margin_si"`
	MarginLow  *float64    `json:"margin_low_si"`  // 5 % point
	MarginHigh *float64    `json:"margin_high_si"` // 95 % point
	FirstFail  *float64    `json:"first_fail_at_s"`
	FailsShare float64     `json:"fails_share"`
	Implicit   bool        `json:"implicit"`
	AtUpTo     bool        `json:"at_up_to"` // the worse of the two hold runs was the one at up_to
	Why        string      `json:"why"`
}

type AlarmResult struct {
	Vessel  string   `json:"vessel"`
	Name    string   `json:"name"`
	At      *float64 `json:"at_s"`
	LimitAt *float64 `json:"limit_at_s"`
	Have    *float64 `json:"have_s"`
	Need    *float64 `json:"need_s"`
	Says    string   `json:"says"`
}

type Flag struct {
	Kind  string   `json:"kind"`
	Where string   `json:"where"`
	From  float64  `json:"from_s"`
	To    float64  `json:"to_s"`
	Says  string   `json:"says"`
	Do    string   `json:"do"`
	Size  *float64 `json:"size"`
}

// Band is the 5, 50 and 95 % points of a number over the samples.
type Band struct {
	Low  *float64 `json:"low"`
	Mid  *float64 `json:"mid"`
	High *float64 `json:"high"`
}

type Assumption struct {
	What    string `json:"what"`
	Because string `json:"because"`
}

type LineUpRow struct {
	Valve    string `json:"valve"`
	Position string `json:"position"` // shut, open, 35 %, auto
	Where    string `json:"where"`
	Kind     string `json:"kind"`  // valve, pump, vent, gully
	Opens    string `json:"opens"` // what path it would open if it were not as stated; ""
}

type HandoverBlock struct {
	At        float64            `json:"at_s"`
	Clock     *string            `json:"clock"`
	Levels    map[string]float64 `json:"levels_m"`
	Rates     map[string]float64 `json:"rates_m_s"`
	Valves    map[string]float64 `json:"valves"`
	Pumps     map[string]string  `json:"pumps"`
	NextStep  string             `json:"next_step"`
	NextLimit string             `json:"next_limit"`
}

type Balance struct {
	Start    float64 `json:"start_m3"`
	In       float64 `json:"in_m3"`
	Out      float64 `json:"out_m3"`
	Spilled  float64 `json:"spilled_m3"`
	Left     float64 `json:"left_m3"`
	Relative float64 `json:"relative_error"`
}

type Work struct {
	Method         string  `json:"method"`
	Steps          int     `json:"steps"`
	Rejected       int     `json:"rejected"`
	Factorisations int     `json:"factorisations"`
	Evaluations    int     `json:"evaluations"`
	Events         int     `json:"events"`
	Wall           float64 `json:"wall_s"`
}

// Series holds samples at every multiple of the spacing and both sides of every step and event.
type Series struct {
	Time    []float64             `json:"time_s"`
	Level   map[string][]float64  `json:"level_m"`
	Volume  map[string][]float64  `json:"volume_m3"`
	Gas     map[string][]float64  `json:"gas_pa_g"`
	Flow    map[string][]float64  `json:"flow_m3_s"`
	Opening map[string][]float64  `json:"opening"`
	Running map[string][]float64  `json:"running"`
	TeeHead map[string][]*float64 `json:"tee_head_m"`
	Crest   map[string][]float64  `json:"crest_m"`
}

// SeriesBand holds the 5, 50 and 95 % points of the levels over the samples, at moments of its own: about a hundred, evenly spread from 0 to run_for, and
// those of the steps. nil when nothing was sampled.
type SeriesBand struct {
	Time  []float64             `json:"time_s"`
	Level map[string]*LevelBand `json:"level_m"`
}

// LevelBand is of one vessel, m, a number for each moment of its SeriesBand.
type LevelBand struct {
	Low  []float64 `json:"low"`
	Mid  []float64 `json:"mid"`
	High []float64 `json:"high"`
}
