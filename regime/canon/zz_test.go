package canon
import ("testing";"fmt")
func TestZZ(t *testing.T){
 for _,q:=range [][]any{{"ThinFilm",[]float64{10,1}},{"ThinFilm",[]float64{1e-6,1}},{"ThinFilm",[]float64{3000,.5}},{"ThinFilm",[]float64{3300,.5}},{"ConveyingPipe",[]float64{.2}},{"ConveyingPipe",[]float64{.294}},{"ConveyingPipe",[]float64{.2,10}},{"ConveyingPipe",[]float64{.95,40,.01}},{"ConveyingPipe",[]float64{.9,100}},{"CircularPlateAddedMass",[]float64{0,0}},{"CircularPlateAddedMass",[]float64{0,10,10}},{"BaffledCircularPlateMode",[]float64{1,0,0,.3,1}},{"BaffledCircularPlateMode",[]float64{0,10,10,.3,60}},{"BaffledPlateMode",[]float64{0,0,1,1,1,1}},{"BaffledPlateMode",[]float64{2,2,1,10,10,60}},{"PanelFlutter",[]float64{}},{"PanelFlutter",[]float64{20}},{"PanelFlutter",[]float64{2,3}}}{
  v,err:=Find(q[0].(string)).Evaluate(q[1].([]float64)); fmt.Println(q,v,err)
 }
 for _,e:=range All(){ i:=e.Sweep(); if i<0 {fmt.Println(e.Name,"none");continue}; a:=&e.Args[i]; f,to:=a.Window(); u:=[]float64{}; for k:=range e.Args{u=append(u,e.Args[k].Usual())}; v,err:=e.Evaluate(u); fmt.Println(e.Name,a.Name,f,to,u,v,err)}
}
