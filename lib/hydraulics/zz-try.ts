import { readFileSync, readdirSync } from 'node:fs';
import { solve } from './solve';
const dir='/work/shared/reference/networks/';
for (const f of readdirSync(dir).filter(f=>!f.includes('expected'))) for (const method of ['simultaneous','hardy-cross'] as const) {
  const doc=JSON.parse(readFileSync(dir+f,'utf8')); doc.options={...doc.options,method};
  const exp=JSON.parse(readFileSync(dir+f.replace('.json','.expected.json'),'utf8')).solve;
  const r=solve(doc);
  let dq=0,dd=0,dp=0;
  for(const l of r.links){const e=exp.links[l.id];dq=Math.max(dq,Math.abs(e.flowLs-l.flowLs));dd=Math.max(dd,Math.abs(e.dropKpa-l.dropKpa));}
  for(const n of r.nodes){dp=Math.max(dp,Math.abs(exp.nodes[n.id]-n.pressureKpa));}
  console.log(f,r.method,r.converged,r.iterations,r.residuals.continuityLs.toExponential(1),r.residuals.loopPa.toExponential(2),'dq',dq.toExponential(2),'ddrop',dd.toExponential(2),'dp',dp.toExponential(2),r.warnings.map(w=>w.code+':'+w.id).join(' '));
}
