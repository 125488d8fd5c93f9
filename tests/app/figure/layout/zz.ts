import {layout} from '../../../../app/figure/layout/layout.ts';
import {cornersOf} from '../../../../app/figure/layout/box.ts';
import {sceneToSvg} from '../../../../app/export/svg.ts';
import type {LabelRequest} from '../../../../app/figure/layout/request.ts';
import type {Point,Scene,Shape} from '../../../../app/figure/scene/scene.ts';
import {Resvg} from '@resvg/resvg-js';
import {writeFileSync} from 'fs';
const frame={x:16,y:8,width:147,height:98};
const X=(t:number)=>16+147*t/150, Y=(p:number)=>106-98*p/450;
const sat=(t:number)=>0.611*Math.exp(17.27*t/(t+237.3))*0.97;
const boil:Point[]=Array.from({length:600},(_,i)=>{const t=148*i/599;return [X(t),Y(sat(t))] as const});
const path:Point[]=[[22,85],[121,207],[121,260],[65,260],[32,85]].map(([t,p])=>[X(t!),Y(p!)] as const);
const liq:Point[]=[[16,8],...boil.toReversed().filter(p=>p[1]>8),[16,106]] ; 
const vap:Point[]=[...boil,[163,8],[163,106]];
const col='#b3401f', ink='#1f2a33', mut='#5b6770';
const c=(o:Partial<LabelRequest>&{id:string})=>o as LabelRequest;
const reqs:LabelRequest[]=[
 ...path.map((p,i)=>c({kind:'point',id:`A${i+1}`,at:p,gap:2,leader:true,tag:col,runs:[{text:`A${i+1}`}],size:7,colour:'#fff',priority:1})),
 c({kind:'line',id:'boil',along:boil,side:'either',runs:[{text:'boiling line of water'}],size:7.5,colour:ink,priority:3}),
 c({kind:'line',id:'held',along:[path[2]!,path[3]!],side:'above',runs:[{text:'pressure held while the product cools'}],size:7.5,colour:col,priority:4,plate:true}),
 c({kind:'line',id:'up',along:[path[1]!,path[2]!],side:'either',runs:[{text:'pump'}],size:7,colour:col,priority:4}),
 c({kind:'line',id:'heat',along:[path[0]!,path[1]!],side:'below',runs:[{text:'heated in 18 min'}],size:7,colour:col,priority:4}),
 c({kind:'area',id:'liq',ring:liq,runs:[{text:'LIQUID WATER'}],size:9,spacing:.18,colour:mut,priority:6}),
 c({kind:'area',id:'vap',ring:vap,runs:[{text:'STEAM'}],size:9,spacing:.18,colour:mut,priority:6}),
 c({kind:'point',id:'tp',at:[X(0.01),Y(0.6)],gap:1.6,runs:[{text:'triple point 0.01 °C'}],size:7,colour:ink,priority:2,plate:true}),
 c({kind:'point',id:'a2n',at:path[1]!,gap:2,runs:[{text:'boiling, 121.1 °C'}],size:7,colour:ink,priority:2,plate:true}),
 c({kind:'point',id:'moved',at:path[4]!,gap:2,offset:[20,10],runs:[{text:'moved, '},{text:'T',italic:true},{text:'c',scale:.7,shift:-.25}],size:7,colour:ink,priority:2,plate:true}),
];
const obst={polylines:[{points:[boil],clearance:.5},{points:[path],clearance:.7},{points:[[[X(0),Y(375)],[X(143),Y(375)],[X(143),Y(0)]] as Point[]],clearance:.5}],circles:path.map(at=>({at,r:1})),boxes:[]};
const t0=performance.now(); const L=layout(reqs,obst,frame); console.log(performance.now()-t0,L.unplaced,L.overlaps);
const line=(id:string,pts:readonly Point[],colour:string,weight:number,closed=false):Shape=>({kind:'poly',id,points:[pts],closed,stroke:{colour,weight}});
const scene:Scene={width:180,height:120,title:'t',description:'d',unplaced:[],layers:[
 {id:'regions',shapes:[{kind:'rect',id:'p',rect:{x:0,y:0,width:180,height:120},fill:{colour:'#fff'}}]},
 {id:'boundaries',clip:frame,shapes:[line('b',boil,ink,1.25),line('r',[[X(0),Y(375)],[X(143),Y(375)],[X(143),Y(0)]],ink,1)]},
 {id:'paths',shapes:[line('p',path,col,1.7),...path.map((at,i):Shape=>({kind:'circle',id:'d'+i,at,r:.7,fill:{colour:col}}))]},
 {id:'frame',shapes:[{kind:'rect',id:'f',rect:frame,stroke:{colour:ink,weight:.75}}]},
 {id:'labels',shapes:L.shapes},
 ...(process.argv[2]?[{id:'cautions' as const,shapes:L.boxes.map((b):Shape=>line('x'+b.id,cornersOf(b.box),'#0a0',.3,true))}]:[])]};
const svg=await sceneToSvg(scene);
writeFileSync('/tmp/l.png', new Resvg(svg,{fitTo:{mode:'width',value:1400},font:{fontFiles:['Regular','Italic','Bold'].map(f=>`/work/main/public/fonts/Inter-${f}.ttf`),loadSystemFonts:false}}).render().asPng());
