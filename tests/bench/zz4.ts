import { solve } from '@/lib/hydraulics/solve';
const fluid={medium:'water' as const,temperatureC:10};
const run=(name:string,n:number,ends:[number,number][],opt:any={})=>{
 const links:any[]=ends.map(([a,b],i)=>({id:`p${i}`,kind:'pipe',from:`n${a}`,to:`n${b}`,lengthM:5+(i%7),boreMm:20+(i%5)*8,roughnessMm:.045}));
 links.push({id:'T',kind:'terminal',from:`n${n-1}`,to:'x',designFlowLs:2,designDropKpa:50},{id:'PU',kind:'pump',from:'x',to:'n0',curve:[{flowLs:0,headM:20},{flowLs:2,headM:15},{flowLs:4,headM:5}]});
 const doc:any={format:'network/1',fluid,nodes:[...Array.from({length:n},(_,i)=>({id:`n${i}`})),{id:'x'}],links,options:opt};
 const a=process.cpuUsage();const r=solve(doc);const b=process.cpuUsage(a);
 console.log(name,links.length,r.method,r.converged,r.iterations,r.residuals.loopPa.toExponential(1),(b.user/1000).toFixed(0)+' cpu ms',r.links.at(-1)!.flowLs);
};
const rnd=(()=>{let s=1;return()=>(s=(s*16807)%2147483647)/2147483647})();
const grid=(w:number,h:number)=>{const e:[number,number][]=[];for(let y=0;y<h;y++)for(let x=0;x<w;x++){if(x+1<w)e.push([y*w+x,y*w+x+1]);if(y+1<h)e.push([y*w+x,(y+1)*w+x]);}return e;};
const K=(n:number)=>{const e:[number,number][]=[];for(let i=0;i<n;i++)for(let j=i+1;j<n;j++)e.push([i,j]);return e;};
const er=(n:number,m:number)=>{const e:[number,number][]=[];for(let i=1;i<n;i++)e.push([i-1,i]);while(e.length<m){const a=Math.floor(rnd()*n),b=Math.floor(rnd()*n);if(a!==b)e.push([a,b]);}return e;};
run('K300',300,K(300));
run('random 2000/4000',2000,er(2000,4000));
run('chain',40000,Array.from({length:39999},(_,i)=>[i,i+1]));
run('hub',2001,[...Array.from({length:2000},(_,i)=>[0,i+1] as [number,number]),...Array.from({length:1999},(_,i)=>[i+1,i+2] as [number,number])]);
