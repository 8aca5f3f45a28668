package judge
import ("testing";"context";"sort";"fmt";"time";"hearduty/internal/bundle")
func TestZZ(t *testing.T){
 r := testing.Benchmark(func(b *testing.B){
 _, at, workers := benchWorkers(b)
 input := Input(at.builder.Worker(workers[0]).Input)
 s := at.engine.(*stock)
 type x struct{d string; n time.Duration}
 var xs []x
 for _, d := range at.bundle.Duties { if d.Subject!="worker" {continue}
  start:=time.Now(); for i:=0;i<300;i++ { run(context.Background(), s.single[d.ID], []*bundle.Duty{d}, input)}
  xs=append(xs,x{d.ID,time.Since(start)/300})
 }
 sort.Slice(xs,func(i,j int)bool{return xs[i].n>xs[j].n})
 for _,y := range xs { fmt.Println(y.d,y.n)}
 b.N=1
 })
 _=r
}
