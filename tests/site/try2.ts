import { SeededRandom } from './seeded-random';
import { designBuilding } from './building';
import { loopHierarchy, type Station } from '@/lib/balancing/hierarchy';
const doc=designBuilding(12,new SeededRandom(1));
const h=loopHierarchy(doc);
const show=(s:Station,d:string)=>{console.log(d+s.link,s.terminals.length,s.designFlowLs.toFixed(2),s.distance);s.members.forEach(m=>show(m,d+'  '))};
show(h.top!,'');
