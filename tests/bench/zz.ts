import { distribution } from '../make/distribution';
import { epanetInput, epanetWorkspace, runEpanet } from '../make/epanet';
import { prepareNetwork } from '@/lib/hydraulics/prepare';
import { solve,findFlows } from '@/lib/hydraulics/solve';
import { solveResult } from '@/lib/hydraulics/solve-result';
const ws=await epanetWorkspace();
for (const mesh of [false,true]) for(const n of [100,1000,3000,10000]){
 const doc=distribution(n,mesh);
 let e; for(let k=0;k<3;k++) e=runEpanet(ws,epanetInput(doc,1e-6),doc.links.length);
 let prep=0,flow=0,res=0,sol;
 for(let k=0;k<6;k++){const a=performance.now();const p=prepareNetwork(doc);const b=performance.now();sol=findFlows(p);const c=performance.now();const r=solveResult(p,sol);const d=performance.now();prep=b-a;flow=c-b;res=d-c;
  if(k==5){let worst=0;r.links.forEach((l,i)=>{worst=Math.max(worst,Math.abs(l.flowLs-e!.flows[i])/Math.max(.05,Math.abs(l.flowLs)))});console.log(n,mesh,doc.links.length,'ours prep',prep.toFixed(1),'flows',flow.toFixed(1),'res',res.toFixed(1),'it',r.iterations,r.converged,r.residuals.loopPa.toExponential(1),'fill',(sol as any).fill,'loops',sol.loops.count,sol.loops.chain.length,'epanet',e!.openMs.toFixed(1),e!.solveMs.toFixed(1),e!.iterations,'maxrel',worst.toFixed(4));}}
}
