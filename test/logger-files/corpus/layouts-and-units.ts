import type { CorpusFile, ExpectedReading } from './corpus-file';
import { lines, temperatures } from './corpus-file';

const eight = '2026-01-20T08:00:00.000Z';
const ten = '2026-01-20T08:10:00.000Z';

function column(header: string, ...cells: string[]): Uint8Array {
  return lines(`Time;${header}`, ...cells.map((cell, index) => `${index === 0 ? eight : ten};${cell}`));
}

function read(quantity: ExpectedReading[0], ...values: number[]): ExpectedReading[] {
  return values.map((value, index) => [quantity, index === 0 ? eight : ten, value]);
}

/** Units, and how readings are spread over columns and rows. */
export const layoutAndUnitFiles: readonly CorpusFile[] = [
  { says: '°F', bytes: column('Temperature (°F)', '70.7', '68'), readings: read('airTemperature', 21.5, 20) },
  {
    says: 'kelvin',
    bytes: column('Temp [K]', '294.65', '293.15'),
    readings: read('airTemperature', 21.5, 20),
  },
  {
    says: 'a humidity as fraction',
    bytes: column('RH (fraction)', '0.602', '0.598'),
    readings: read('relativeHumidity', 60.2, 59.8),
  },
  {
    says: 'kilolux',
    bytes: column('Illuminance (klx)', '1.25', '0.5'),
    readings: read('illuminance', 1250, 500),
  },
  // One foot-candle is one lumen per square foot: 1 / 0.3048² lx.
  {
    says: 'foot-candles',
    bytes: column('Light (fc)', '100', '0'),
    readings: read('illuminance', 1076.391042, 0),
  },
  {
    says: 'photon flux in four spellings',
    bytes: lines(
      'Time,PAR (µmol/m²/s),PPFD (umol m-2 s-1),PPFD [μmol·m⁻²·s⁻¹],Light (µmol/(m² s))',
      `${eight},1,2,3,4`,
    ),
    readings: [1, 2, 3, 4].map((value): ExpectedReading => ['ppfd', eight, value]),
  },
  {
    says: 'units beside the values',
    bytes: lines('Time,Temperature,Humidity', `${eight},21.5 °C,60.2%`, `${ten},68 °F,59.8 %`),
    readings: [
      ['airTemperature', eight, 21.5],
      ['relativeHumidity', eight, 60.2],
      ['airTemperature', ten, 20],
      ['relativeHumidity', ten, 59.8],
    ],
  },
  {
    says: 'no unit, values that only fit °F',
    bytes: column('Temperature', '70.7', '68'),
    readings: read('airTemperature', 21.5, 20),
  },
  {
    says: 'a temperature of 294 in °C, which is questioned',
    bytes: column('Temperature (°C)', '294.6', '293.1'),
    readings: [],
    rejected: [
      ['VALUE_OUT_OF_RANGE', 2, 2],
      ['VALUE_OUT_OF_RANGE', 3, 2],
    ],
    questions: ['UNIT_QUESTIONED'],
  },
  {
    says: 'a humidity of 4, which is questioned',
    bytes: column('Humidity (%)', '4.1', '4.2'),
    readings: read('relativeHumidity', 4.1, 4.2),
    questions: ['UNIT_QUESTIONED'],
  },
  {
    says: 'computed quantities, which are only compared',
    bytes: lines(
      'Time,Temperature (°C),VPD (hPa),Dew point (°F),Abs. humidity (g/m³)',
      `${eight},21.5,10.2,55.4,11.3`,
    ),
    readings: [
      ['airTemperature', eight, 21.5],
      ['vapourPressureDeficit', eight, 1.02],
      ['dewPoint', eight, 13],
      ['absoluteHumidity', eight, 11.3],
    ],
  },
  {
    says: 'air and root zone told apart, other columns left out',
    bytes: lines(
      'Time,Air temp (°C),Soil temp (°C),Soil moisture (%),CO2 (ppm),Battery (%)',
      `${eight},21.5,19.25,44,700,98`,
    ),
    readings: [
      ['airTemperature', eight, 21.5],
      ['rootZoneTemperature', eight, 19.25],
    ],
  },
  {
    says: 'German headers',
    bytes: lines(
      'Datum;Uhrzeit;Lufttemperatur [°C];rel. Luftfeuchtigkeit [%];Beleuchtungsstärke [lx];Bodentemperatur [°C]',
      '20.01.2026;09:00;21,5;60,2;1.250;19,0',
    ),
    readings: [
      ['airTemperature', eight, 21.5],
      ['relativeHumidity', eight, 60.2],
      ['illuminance', eight, 1250],
      ['rootZoneTemperature', eight, 19],
    ],
  },
  {
    says: 'French headers',
    bytes: lines(
      'Horodatage;Température (°C);Humidité relative (%);Éclairement (lux)',
      '20/01/2026 09:00;21,5;60,2;1250,5',
    ),
    readings: [
      ['airTemperature', eight, 21.5],
      ['relativeHumidity', eight, 60.2],
      ['illuminance', eight, 1250.5],
    ],
  },
  {
    says: 'Spanish headers',
    bytes: lines(
      'Fecha;Temperatura (°C);Humedad relativa (%);Punto de rocío (°C)',
      '20/01/2026 09:00;21,5;60,2;13,5',
    ),
    readings: [
      ['airTemperature', eight, 21.5],
      ['relativeHumidity', eight, 60.2],
      ['dewPoint', eight, 13.5],
    ],
  },
  {
    says: 'Dutch headers',
    bytes: lines(
      'Tijd;Temperatuur (°C);Luchtvochtigheid (%);Bodemtemperatuur (°C)',
      '20-01-2026 09:00;21,5;60,2;19,0',
    ),
    readings: [
      ['airTemperature', eight, 21.5],
      ['relativeHumidity', eight, 60.2],
      ['rootZoneTemperature', eight, 19],
    ],
  },
  {
    says: 'a group of columns for each sensor',
    bytes: lines(',North,,South,', 'Time,Temp (°C),RH (%),Temp (°C),RH (%)', `${eight},21.5,60.2,22.5,58`),
    readings: [
      ['airTemperature', eight, 21.5],
      ['relativeHumidity', eight, 60.2],
      ['airTemperature', eight, 22.5],
      ['relativeHumidity', eight, 58],
    ],
  },
  {
    says: 'a wide file with a column that names the sensor',
    bytes: lines('Sensor,Time,Temperature (°C)', `North,${eight},21.5`, `South,${eight},22.5`),
    readings: [
      ['airTemperature', eight, 21.5, 'North'],
      ['airTemperature', eight, 22.5, 'South'],
    ],
  },
  {
    says: 'a long file with sensor, quantity, value and unit',
    bytes: lines(
      'Time,Sensor,Quantity,Value,Unit',
      `${eight},North,temperature,21.5,°C`,
      `${eight},North,humidity,60.2,%`,
      `${eight},South,temperature,68,°F`,
    ),
    readings: [
      ['airTemperature', eight, 21.5, 'North'],
      ['relativeHumidity', eight, 60.2, 'North'],
      ['airTemperature', eight, 20, 'South'],
    ],
  },
  {
    says: 'a long file whose quantities carry their units, with one that is not kept',
    bytes: lines(
      'Time,Parameter,Value',
      `${eight},Temperature (°C),21.5`,
      `${eight},Humidity (%),60.2`,
      `${eight},CO2 (ppm),700`,
    ),
    readings: [
      ['airTemperature', eight, 21.5],
      ['relativeHumidity', eight, 60.2],
    ],
    rejected: [['QUANTITY_UNKNOWN', 4, 2]],
  },
  {
    says: 'a daily file of minima and maxima',
    zone: 'UTC',
    bytes: lines('date,temp_max,temp_min', '2026-01-20,24.5,18.25'),
    readings: temperatures(['2026-01-20', 24.5], ['2026-01-20', 18.25]),
  },
];
