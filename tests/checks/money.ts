// SOURCE: arithmetic on the trade's figures (90 cfm, 10 °F, 12 W; 1.08 Btu·min/(h·ft³·°F) for air at 0.075 lb/ft³), redone
// apart from this program; propane 91 500 Btu a US gallon, gross (from memory).
export const LOOP_AT_SEA = { cfm: 90, rise10F: 5.5556, watts: 284.87, fanW: 12, ratio: 23.74 };
export const LOOP_AT_2400_M = { watts: 212.6, ratio: 17.72 };
export const FAN = {
  watts: 12,
  kWhADay: 0.288,
  seasonDays: 212,
  duty: 0.5,
  kWhASeason: 30.528,
  price: '0.15',
  cost: 4.58,
};
export const HEAT_PRICE = {
  electricity: '0.15',
  loop: 0.00632,
  propane: '3.00',
  kWh: 26.82,
  efficiency: 0.8,
  perKWh: 0.1398,
};
