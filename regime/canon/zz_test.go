package canon
import ("testing";"fmt";"syscall")
func cpu() float64 { var r syscall.Rusage; syscall.Getrusage(0,&r); return float64(r.Utime.Sec+r.Stime.Sec)+float64(r.Utime.Usec+r.Stime.Usec)*1e-6 }
func per(name string, n int, f func()) { best:=1e9; for range 7 { t:=cpu(); for range n { f() }; if d:=(cpu()-t)/float64(n)*1e6; d<best {best=d} }; fmt.Printf("%s %.2f µs cpu\n",name,best) }
func TestZZ(t *testing.T){
 per("panel10",50,func(){PanelFlutter(10,0)})
 per("panel20",40,func(){PanelFlutter(20,0)})
 for _,c:=range [][3]float64{{.2,0,0},{.5,0,0},{.8,0,0},{.95,0,0},{.9,100,0},{.5,10,0},{.9,0,1e-3},{.9,40,.01},{.2,-5,0}} { per(fmt.Sprint("pipe ",c),20,func(){ConveyingPipe(c[0],c[1],c[2],PipeCantilever)}) }
 per("flutter",50,func(){SectionFlutter(20,-.2,.1,.24,.4,0,0)})
 per("flutter damped",50,func(){SectionFlutter(20,-.2,.1,.24,.4,0.01,0.01)})
 for _,c:=range []plateKey{{edges:[4]byte([]byte("CCCC")),aspect:1,m:1,n:1,nu:.3},{edges:[4]byte([]byte("CFFF")),aspect:1,m:1,n:1,nu:.3},{edges:[4]byte([]byte("CCFF")),aspect:1,m:3,n:1,nu:.3},{edges:[4]byte([]byte("FFFF")),aspect:1,m:1,n:1,nu:.3},{edges:[4]byte([]byte("CCCC")),aspect:1,m:10,n:10,nu:.3}} { per("plate "+string(c.edges[:])+fmt.Sprint(c.m),5,func(){solvePlate(c)}) }
 per("baffled 1 1",50,func(){solveBaffledPlate(baffledKey{x:0,y:0,aspect:1,m:1,n:1,k0:1})})
 per("baffled 10 10 60",10,func(){solveBaffledPlate(baffledKey{x:2,y:2,aspect:1,m:10,n:10,k0:60})})
 per("shell general 1000",3000,func(){CylinderInShell(1000,1.5)})
 per("shell general 100",3000,func(){CylinderInShell(100,2)})
 per("shell gap",3000,func(){CylinderInShell(1,1.4)})
 per("cyl 10",3000,func(){OscillatingCylinder(10)})
 per("cyl 400",3000,func(){OscillatingCylinder(400)})
 per("ribbon 10",3000,func(){OscillatingRibbon(10)})
 per("film",3000,func(){ThinFilm(30,.3)})
 per("tube13",3000,func(){PulsatileTube(13)})
 per("theo",3000,func(){Theodorsen(.3)})
 per("sound19",3000,func(){SoundCylinder(19)})
 per("piston19",3000,func(){BaffledPiston(19)})
 per("elastic",200,func(){ElasticBeamMode(BeamEnd{Translation:1e12,Rotation:10},BeamEnd{Translation:3},1)})
 per("disc",200,func(){CircularPlateMode(CircularFree,3,3,.3)})
}
