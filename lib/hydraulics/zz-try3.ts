import { readFileSync, readdirSync } from 'node:fs';
import { balance } from './balance';
const dir='/work/shared/reference/networks/';
for (const f of readdirSync(dir).filter(f=>!f.includes('expected'))) for (const pe of ['speed','throttle']){
  const doc=JSON.parse(readFileSync(dir+f,'utf8')); doc.options={pumpExcess:pe};
  const exp=JSON.parse(readFileSync(dir+f.replace('.json','.expected.json'),'utf8')).balance;
  const r=balance(doc);
  console.log(f,pe,r.converged,r.indexTerminal,JSON.stringify(r.pumps), r.warnings.map(w=>w.message), r.terminals.map(t=>t.id+' '+t.percentOfDesign.toFixed(4)+' '+t.circuitDropKpa?.toFixed(3)+' '+t.authority).join('|'), r.valves.map(v=>v.id+v.state+v.setting.toFixed(3)).join(' '));
}
