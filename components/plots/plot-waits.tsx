import { HEIGHT } from './look';

/** While the drawing of pictures is fetched: the room it will take, and words where that lasts. */
export const PlotWaits = () => (
  <p className="flex items-end text-grey" style={{ height: HEIGHT }}>
    Drawing the curve
  </p>
);
