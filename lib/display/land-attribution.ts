/**
 * The words the licence of the land data asks for wherever the coastline is shown.
 * Source: OpenStreetMap Foundation, Attribution Guidelines (2021); Open Database License 1.0, section 4.3.
 */
export const LAND_ATTRIBUTION = "Land: OpenStreetMap contributors, ODbL";
/** Where the data's makers explain their licence. */
export const LAND_ATTRIBUTION_URL = "https://www.openstreetmap.org/copyright";
