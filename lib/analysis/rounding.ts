/** What a figure can bear: kept figures are cut once, where they are made, so that everybody shows the same. */
export const round = (value: number, decimals: number) => Number(value.toFixed(decimals));
