import { solve } from './solve';
import { balance } from './balance';
import type { NetworkDocument, NetworkLink } from './types';
const fluid={medium:'custom' as const,densityKgM3:999.94,viscosityMPaS:1.4284,specificHeatKJKgK:4.1977};
// dp controller: riser with two branches each with controller, compare to reference solver in python
const nodes=new Set<string>(); const links:NetworkLink[]=[];
const add=(l:any)=>{nodes.add(l.from);nodes.add(l.to);links.push(l);};
const curve=[0,.5,1,1.5,2,2.5,3].map(q=>({flowLs:q,headM:20-1.2*q*q}));
add({id:'PU',kind:'pump',from:'X',to:'S0',curve});
for(let b=1;b<=4;b++){
 add({id:`s${b}`,kind:'pipe',from:`S${b-1}`,to:`S${b}`,lengthM:10,boreMm:40.94,roughnessMm:.045});
 add({id:`r${b}`,kind:'pipe',from:`R${b}`,to:b>1?`R${b-1}`:'X',lengthM:10,boreMm:40.94,roughnessMm:.045});
 add({id:`bs${b}`,kind:'pipe',from:`S${b}`,to:`b${b}`,lengthM:3,boreMm:26.64,roughnessMm:.045});
 add({id:`br${b}`,kind:'pipe',from:`c${b}`,to:`d${b}`,lengthM:3,boreMm:26.64,roughnessMm:.045});
 add({id:`C${b}`,kind:'dpController',from:`d${b}`,to:`R${b}`,setpointKpa:30+5*b+(b==4?200:0),sense:[`b${b}`,`c${b}`],kvs:8});
 for(let t=1;t<=2;t++) add({id:`T${b}${t}`,kind:'terminal',from:`b${b}`,to:`c${b}`,designFlowLs:.2,designDropKpa:30});
}
const doc:NetworkDocument={format:'network/1',fluid,nodes:[...nodes].map(id=>({id})),links,reference:{node:'X',gaugePressureKpa:0}};
import { writeFileSync } from 'node:fs';
writeFileSync('/tmp/dpc.json',JSON.stringify(doc));
for (const method of ['simultaneous','hardy-cross'] as const){
const r=solve({...doc,options:{method}});
console.log(r.method,r.converged,r.iterations,r.residuals,r.warnings.map(w=>w.code+w.id),r.links.filter(l=>/^[CPT]/.test(l.id)).map(l=>`${l.id} ${l.flowLs.toFixed(6)} ${l.dropKpa.toFixed(5)}`).join('\n'));
}
