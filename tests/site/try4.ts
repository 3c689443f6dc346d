import { SeededRandom } from './seeded-random';
import { designBuilding } from './building';
import { VirtualSite } from './virtual-site';
import { visitProportionally } from '../bench/proportional-visit';
import { CountedSite, visitRow } from '../bench/visit-count';
const n=Number(process.argv[2]);
for (const s of process.argv[3].split(',')) { const seed=Number(s);
const r=new SeededRandom(1000*n+seed);
const doc=designBuilding(n,r);
const site=new VirtualSite(doc,r);
const c=new CountedSite(site);
const a=process.cpuUsage().user;
const named=visitProportionally(doc,c);
const row=visitRow('proportional',doc,seed,site,c,named,(process.cpuUsage().user-a)/1e6);
console.log(JSON.stringify(row));
if(process.env.SHOW){console.log(site.faults.map(f=>f.cause+' '+f.valve).join('; '));const bad=[...site.trueRatios()].filter(([,x])=>Math.abs(x-1)>.05);console.log(bad.map(([i,x])=>i+' '+x.toFixed(3)).join(' '))}
}
