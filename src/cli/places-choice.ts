// How places are told.

export const placesChoices = ['exact', 'shifted', 'schematic'] as const;
export type PlacesChoice = (typeof placesChoices)[number];
