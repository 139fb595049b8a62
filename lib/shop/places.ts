/** ISO 3166-1 countries with the ISO 4217 currency in use there, from memory. */
const currencyByCountry =
  "AD EUR AE AED AF AFN AG XCD AL ALL AM AMD AO AOA AR ARS AT EUR AU AUD AZ AZN BA BAM BB BBD BD BDT BE EUR " +
  "BF XOF BG EUR BH BHD BI BIF BJ XOF BM BMD BN BND BO BOB BR BRL BS BSD BT BTN BW BWP BY BYN BZ BZD CA CAD " +
  "CD CDF CF XAF CG XAF CH CHF CI XOF CL CLP CM XAF CN CNY CO COP CR CRC CU CUP CV CVE CY EUR CZ CZK DE EUR " +
  "DJ DJF DK DKK DM XCD DO DOP DZ DZD EC USD EE EUR EG EGP ES EUR ET ETB FI EUR FJ FJD FO DKK FR EUR GA XAF " +
  "GB GBP GD XCD GE GEL GG GBP GH GHS GI GIP GL DKK GM GMD GN GNF GQ XAF GR EUR GT GTQ GY GYD HK HKD HN HNL " +
  "HR EUR HT HTG HU HUF ID IDR IE EUR IL ILS IM GBP IN INR IQ IQD IR IRR IS ISK IT EUR JE GBP JM JMD JO JOD " +
  "JP JPY KE KES KG KGS KH KHR KM KMF KN XCD KR KRW KW KWD KY KYD KZ KZT LA LAK LB LBP LC XCD LI CHF LK LKR " +
  "LR LRD LS LSL LT EUR LU EUR LV EUR LY LYD MA MAD MC EUR MD MDL ME EUR MG MGA MK MKD ML XOF MM MMK MN MNT " +
  "MO MOP MR MRU MT EUR MU MUR MV MVR MW MWK MX MXN MY MYR MZ MZN NA NAD NC XPF NE XOF NG NGN NI NIO NL EUR " +
  "NO NOK NP NPR NZ NZD OM OMR PA PAB PE PEN PF XPF PG PGK PH PHP PK PKR PL PLN PR USD PT EUR PY PYG QA QAR " +
  "RE EUR RO RON RS RSD RU RUB RW RWF SA SAR SB SBD SC SCR SD SDG SE SEK SG SGD SI EUR SK EUR SL SLE SM EUR " +
  "SN XOF SO SOS SR SRD ST STN SV USD SY SYP SZ SZL TD XAF TG XOF TH THB TJ TJS TM TMT TN TND TO TOP TR TRY " +
  "TT TTD TW TWD TZ TZS UA UAH UG UGX US USD UY UYU UZ UZS VA EUR VC XCD VE VES VN VND VU VUV WS WST XK EUR " +
  "YE YER ZA ZAR ZM ZMW ZW ZWG";

const pairs = currencyByCountry.match(/[A-Z]{2} [A-Z]{3}/g) ?? [];
const currencies = new Map(pairs.map((pair) => [pair.slice(0, 2), pair.slice(3)]));

export const countryCodes: readonly string[] = [...currencies.keys()];
export const currencyCodes: readonly string[] = [...new Set(currencies.values())].sort();

export function currencyOf(country: string): string {
  return currencies.get(country) ?? "EUR";
}

/** How dates and numbers are written; the words of the interface are English. */
export const locales = [
  { value: "en-GB", label: "14 May 2026 · 1,234.5" },
  { value: "en-US", label: "May 14, 2026 · 1,234.5" },
  { value: "de-DE", label: "14. Mai 2026 · 1.234,5" },
  { value: "de-CH", label: "14. Mai 2026 · 1’234.5" },
  { value: "fr-FR", label: "14 mai 2026 · 1 234,5" },
  { value: "it-IT", label: "14 mag 2026 · 1234,5" },
  { value: "es-ES", label: "14 may 2026 · 1234,5" },
  { value: "nl-NL", label: "14 mei 2026 · 1.234,5" },
  { value: "sv-SE", label: "14 maj 2026 · 1 234,5" },
  { value: "pl-PL", label: "14 maj 2026 · 1234,5" },
  { value: "ja-JP", label: "2026年5月14日 · 1,234.5" },
] as const;

const defaultLocale = "en-GB";

/** The nearest of our locales to what a browser asks for. */
export function nearestLocale(wanted: string | undefined): string {
  const exact = locales.find(({ value }) => value === wanted);
  const language = wanted?.split("-")[0];
  const near = locales.find(({ value }) => value.split("-")[0] === language);
  return (exact ?? near)?.value ?? defaultLocale;
}
