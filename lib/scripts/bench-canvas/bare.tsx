import ELK from 'elkjs/lib/elk-api.js';
import { createRoot } from 'react-dom/client';
import { ReactFlow, useEdgesState, useNodesState, type Edge, type Node } from 'reactflow';
import 'reactflow/dist/style.css';

/**
 * What the sheet is measured against: a page of reactflow and nothing else, with as many of its own default nodes and edges.
 * It is built apart into a temporary folder and is no part of the product.
 */
interface Graph {
  nodes: Node[];
  edges: Edge[];
  zoom: number;
}

const graph = (await (await fetch('./graph.json')).json()) as Graph;
const VIEW = { x: 0, y: 0, zoom: graph.zoom };

function Bare() {
  const [nodes, , onNodesChange] = useNodesState(graph.nodes);
  const [edges, , onEdgesChange] = useEdgesState(graph.edges);
  return (
    <ReactFlow
      nodes={nodes}
      edges={edges}
      onNodesChange={onNodesChange}
      onEdgesChange={onEdgesChange}
      defaultViewport={VIEW}
      minZoom={0.05}
    />
  );
}

/** elkjs alone on a graph, in a worker that is made for it and ended with it, as the sheet does. */
Object.assign(window, {
  async layOut(file: string): Promise<number> {
    const laidOut = await (await fetch(file)).json();
    const start = performance.now();
    const elk = new ELK({ workerFactory: () => new Worker(new URL('./elk.worker.ts', import.meta.url)) });
    await elk.layout(laidOut);
    elk.terminateWorker();
    return performance.now() - start;
  },
});

createRoot(document.getElementById('root')!).render(<Bare />);
