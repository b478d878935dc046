declare module 'verb-nurbs-web' {
  interface NurbsSurface {
    derivatives(u: number, v: number, order: number): number[][][];
  }
  const verb: {
    geom: {
      NurbsSurface: {
        byKnotsControlPointsWeights(
          degreeU: number,
          degreeV: number,
          knotsU: number[],
          knotsV: number[],
          points: number[][][],
          weights: number[][],
        ): NurbsSurface;
      };
    };
  };
  export default verb;
}
