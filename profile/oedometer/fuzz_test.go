package oedometer

import (
	"encoding/binary"
	"errors"
	"fmt"
	"math"
	"reflect"
	"testing"

	"pgregory.net/rapid"
)

// FuzzInterpret feeds arbitrary numbers: no panic, no NaN or Inf in what comes
// out, errors of the two stated kinds.
func FuzzInterpret(f *testing.F) {
	f.Add([]byte{}, 1.0, 80.0)
	f.Add(encode(12.5, 1.18, 25, 1.17, 50, 1.15, 100, 1.10, 200, 1.0, 400, 0.88), 1.2, 40.0)
	f.Add(encode(12.5, 1.18, 12.5, 1.18, 12.5, 1.18, 12.5, 1.18, 13, 1.1, 13.1, 1.0), 1.2, 40.0)
	f.Add(encode(10, 1, 20, 1, 40, 1, 80, 1, 160, 1), 1.0, 40.0)
	f.Add(encode(10, 1.0, 20, 0.9, 40, 0.8, 80, 0.7, 160, 0.6), 1.0, 40.0)
	f.Add(encode(1e-300, 1.0, 1e-200, 0.9, 1e-100, 0.8, 80, 0.7, 160, 0.6), 1.0, 1e-300)
	f.Add(encode(10, 1.0, 20, 0.99, 40, 0.97, 80, 0.9, 20, 0.91, 40, 0.905, 80, 0.895, 160, 0.7, 320, 0.5, 640, 0.3), 1.0, 30.0)
	f.Fuzz(func(t *testing.T, data []byte, e0, inSitu float64) {
		r := Record{InitialVoidRatio: Known(e0)}
		for len(data) >= 16 && len(r.Stages) < 300 {
			r.Stages = append(r.Stages, Stage{
				EffectiveStress: math.Float64frombits(binary.LittleEndian.Uint64(data)),
				VoidRatio:       Known(math.Float64frombits(binary.LittleEndian.Uint64(data[8:]))),
			})
			data = data[16:]
		}
		c, err := Prepare(r)
		if err != nil {
			var problems Problems
			if !errors.As(err, &problems) || len(problems) == 0 {
				t.Fatalf("error of another kind: %v", err)
			}
			return
		}
		got, err := Interpret(c, Situation{EffectiveStress: Known(inSitu)})
		if err != nil {
			if !errors.Is(err, ErrTooFewPoints) {
				t.Fatalf("error of another kind: %v", err)
			}
			return
		}
		finite(t, "Interpretation", reflect.ValueOf(got))
		y := got.Preconsolidation
		if !(y.Low <= y.Best && y.Best <= y.High) || y.Best < 0 {
			t.Errorf("%+v is not ordered", y)
		}
		if got.Grade == "" || len(got.Reasons) == 0 {
			t.Error("no grade or no reason")
		}
	})
}

func encode(v ...float64) []byte {
	var b []byte
	for _, x := range v {
		b = binary.LittleEndian.AppendUint64(b, math.Float64bits(x))
	}
	return b
}

// finite walks a value and reports every float that is not finite.
func finite(t interface{ Errorf(string, ...any) }, path string, v reflect.Value) {
	switch v.Kind() {
	case reflect.Float64:
		if x := v.Float(); math.IsNaN(x) || math.IsInf(x, 0) {
			t.Errorf("%s is %v", path, x)
		}
	case reflect.Struct:
		for i := range v.NumField() {
			finite(t, path+"."+v.Type().Field(i).Name, v.Field(i))
		}
	case reflect.Slice:
		for i := range v.Len() {
			finite(t, fmt.Sprintf("%s[%d]", path, i), v.Index(i))
		}
	}
}

// Wild curves that a record may hold: any order of stresses, void ratios that go
// the right way by any amount.
func TestWildCurves(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		e0 := rapid.Float64Range(0.2, 6).Draw(t, "e0")
		r := Record{InitialVoidRatio: Known(e0), Kind: TestKind(rapid.IntRange(0, 3).Draw(t, "kind"))}
		e, stress := e0, rapid.Float64Range(0.5, 50).Draw(t, "first")
		for range rapid.IntRange(1, 40).Draw(t, "stages") {
			next := stress * rapid.SampledFrom([]float64{0.25, 0.5, 0.9, 0.99, 1, 1.0001, 1.01, 1.25, 1.5, 2, 2, 2, 4}).Draw(t, "ratio")
			if next < 0.1 || next > 1e5 {
				continue
			}
			fall := rapid.SampledFrom([]float64{0, 0, 0.001, 0.01, 0.05, 0.3}).Draw(t, "fall") * e
			if next < stress {
				fall = -fall / 10
			}
			stress, e = next, e-fall
			r.Stages = append(r.Stages, Stage{EffectiveStress: stress, VoidRatio: Known(e), T50: Known(5)})
		}
		c, err := Prepare(r)
		if err != nil {
			return
		}
		s := Situation{}
		if rapid.Bool().Draw(t, "in situ") {
			s.EffectiveStress = Known(rapid.Float64Range(0.1, 500).Draw(t, "σ′v0"))
		}
		got, err := Interpret(c, s)
		if err != nil {
			return
		}
		finite(t, "Interpretation", reflect.ValueOf(got))
		for _, m := range got.Methods {
			if !m.Known && m.Note == "" {
				t.Errorf("%s was refused without a reason", m.ID)
			}
			for _, k := range m.Points {
				if k < 0 || k >= len(c.Points) {
					t.Errorf("%s: point %d of %d", m.ID, k, len(c.Points))
				}
			}
		}
		if y := got.Preconsolidation; y.Bound != Undetermined && !(y.Low > 0 && y.Low <= y.Best && y.Best <= y.High) {
			t.Errorf("%+v is not ordered", y)
		}
		if len(got.Reasons) == 0 {
			t.Error("no reason for the grade")
		}
	})
}
