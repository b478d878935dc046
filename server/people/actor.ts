/** Who asks: the signed-in person, as services need to know them. */
export interface Actor {
  id: string;
  name: string;
  administrator: boolean;
}
