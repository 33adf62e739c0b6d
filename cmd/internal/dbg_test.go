package internal
import ("testing";"os";"headfall/scenarios";"headfall/network";"context";"fmt")
func TestDbg(t *testing.T){
 b,_:=os.ReadFile("/work/main/scenarios/balance_tanks.yaml")
 p,err:=scenarios.Load("x",b,scenarios.Options{})
 if err!=nil{t.Fatal(err)}
 m,_:=network.Compile(p,network.Options{})
 r,err:=m.Run(context.Background(),network.RunOptions{Series:true})
 fmt.Println(r.Verdict,err)
 for _,f:=range r.Flags{fmt.Println(*f)}
}
