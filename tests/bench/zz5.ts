import { distribution } from '../make/distribution';
import { prepareNetwork } from '@/lib/hydraulics/prepare';
import { startIteration } from '@/lib/hydraulics/solve';
for(const [n,mesh] of [[1000,true],[10000,true],[10000,false]] as const){
 const p=prepareNetwork(distribution(n,mesh)); const it:any=startIteration(p);
 const t0=process.cpuUsage();for(let k=0;k<5;k++) it.solver.assemble(it.state.chainSlope); const t1=process.cpuUsage(t0);
 const t2=process.cpuUsage();for(let k=0;k<5;k++) it.state.evaluate(); const t3=process.cpuUsage(t2);
 const t4=process.cpuUsage();for(let k=0;k<5;k++) it.solver.solve(it.loopHead,it.loopStep); const t5=process.cpuUsage(t4);
 console.log(n,mesh,'loops',it.loops.count,it.loops.chain.length,'fill',it.solver.factors.fill,'work',it.solver.factors.work(),'assemble cpu ms',t1.user/5000,'eval',t3.user/5000,'solve',t5.user/5000,'shared',it.solver.shared.slot.length);
}
