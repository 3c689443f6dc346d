import { distribution } from '../make/distribution';
import { epanetInput, epanetWorkspace, runEpanet } from '../make/epanet';
import { prepareNetwork } from '@/lib/hydraulics/prepare';
import { shortLoops } from '@/lib/hydraulics/graph/loops';
import { chainsOf } from '@/lib/hydraulics/graph/chains';
import { contract } from '@/lib/hydraulics/graph/contraction';
import { SimultaneousIteration } from '@/lib/hydraulics/simultaneous';
import { NetworkState } from '@/lib/hydraulics/network-state';
import { loopSolver } from '@/lib/hydraulics/loop-matrix';
import { findFlows } from '@/lib/hydraulics/solve';
import { solveResult } from '@/lib/hydraulics/solve-result';
const acc:Record<string,number[]>={};
const cpu=()=>{const u=process.cpuUsage();return (u.user+u.system)/1000};
const t=(k:string,f:()=>any)=>{const a=performance.now();const r=f();(acc[k]??=[]).push(performance.now()-a);return r};
const med=(x:number[])=>x.sort((a,b)=>a-b)[x.length>>2];
const ws=await epanetWorkspace();
for (const mesh of [false,true]) for(const n of [1000,10000]){
 const doc=distribution(n,mesh);
 const inp=epanetInput(doc,1e-6);
 for(const k in acc) delete acc[k];
 let it:any,fill=0,iters=0;
 for(let k=0;k<12;k++){
  const p=t('prep',()=>prepareNetwork(doc));
  t('chains',()=>chainsOf(doc.nodes.length,p.from,p.to));
  t('contract',()=>contract(doc.nodes.length,p.chains.from,p.chains.to));
  const l=t('loops',()=>shortLoops(doc.nodes.length,p.chains));
  const m=t('matrix',()=>loopSolver(l,p.chains.count)); fill=m.factors.fill;
  const st=t('state',()=>new NetworkState(p));
  it=t('iterobj',()=>new SimultaneousIteration(st,l,null));
  t('start',()=>it.start()); 
  iters=t('run',()=>it.run()).iterations;
  t('eval',()=>st.evaluate());
  t('factor',()=>m.assemble(st.chainSlope));
  const sol=t('findFlows',()=>findFlows(p));
  t('result',()=>solveResult(p,sol));
  const e=runEpanet(ws,inp,1);
  (acc.eopen??=[]).push(e.openMs);(acc.esolve??=[]).push(e.solveMs);
 }
 console.log(n,mesh,'it',iters,'fill',fill,Object.entries(acc).map(([k,v])=>k+' '+med(v).toFixed(1)).join(' | '));
}
