/** What the project remembers of the map. What stands there may be of another version of the page. */
export interface MapView {
  /** name of the layer; none: the one that is chosen on the page, else the first doped one */ layer?: string;
  /** no lines of the textbook's error */ noErrors?: boolean;
  /** highest temperature, K */ hottest?: number;
}
