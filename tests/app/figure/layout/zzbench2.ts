import {crowd,frame,seeded} from './crowds.ts';
import {layout} from '../../../../app/figure/layout/layout.ts';
import type {LabelRequest} from '../../../../app/figure/layout/request.ts';
const cs=Array.from({length:20},(_,k)=>{const c=crowd(k+1,0,20000);const rnd=seeded(k);const curves=c.obstacles.polylines!.map(p=>p.points[0]!);
const b=(i:number)=>({id:'l'+i,size:7,colour:'#000',priority:i%4});
const requests:LabelRequest[]=[];
for(let i=0;i<40;i++){const cv=curves[i%5]!;requests.push({...b(i),runs:[{text:'A'+i}],kind:'point',at:cv[Math.floor(rnd()*cv.length)]!,gap:2,leader:true,tag:'#b3401f'});}
for(let i=40;i<50;i++){const cv=curves[i%5]!;requests.push({...b(i),runs:[{text:'held 12 min'}],kind:'point',at:cv[Math.floor(rnd()*cv.length)]!,gap:2,plate:true});}
for(let i=50;i<56;i++)requests.push({...b(i),runs:[{text:'boiling line of water'}],kind:'line',along:curves[i%5]!,side:'either'});
for(let i=56;i<60;i++){const q=i-56;const x=frame.x+(q%2)*frame.width/2,y=frame.y+Math.floor(q/2)*frame.height/2;requests.push({...b(i),priority:9,spacing:.18,runs:[{text:'LIQUID WATER'}],kind:'area',ring:[[x,y],[x+frame.width/2,y],[x+frame.width/2,y+frame.height/2],[x,y+frame.height/2]]});}
return {requests,obstacles:c.obstacles}});
for(let r=0;r<8;r++){const ts:number[]=[];let u=0;for(const c of cs){const t=performance.now();u+=layout(c.requests,c.obstacles,frame).unplaced.length;ts.push(performance.now()-t)}ts.sort((a,b)=>a-b);console.log('real ms median',ts[10]!.toFixed(2),'max',ts[19]!.toFixed(1),'unplaced',u/20)}
