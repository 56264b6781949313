namespace LabWatch.Tests.Lab;

/// <summary>A small valid lab file, invented, with two instruments that follow one another in one channel.</summary>
internal static class LabFileSample
{
    public const string Text = """
        {
          // Comments and trailing commas are allowed.
          "format": "labwatch-lab/1",
          "site": { "id": "sample", "name": "Sample site", "timeZone": "UTC" },
          "sources": [
            {
              "id": "fir", "name": "Fir", "kind": "stirred-bath", "route": "contact",
              "range": { "minimumCelsius": -20, "maximumCelsius": 90 },
              "purgeGas": "dry nitrogen",
              "bands": [ { "id": "lw", "name": "8 to 14 um", "lowerMicrometre": 8, "upperMicrometre": 14 } ],
              "cavity": {
                "shape": "cylinder-outward-cone", "radiusMillimetre": 30, "lengthMillimetre": 300, "coneHalfAngleDegree": 60, "apertureRadiusMillimetre": 25, "uniformZone": { "fromMillimetre": 20, "toMillimetre": 300 },
                "coating": [ { "band": "lw", "emissivity": { "value": 0.95, "standardUncertainty": 0.01 }, "diffuseFraction": { "value": 0.9, "standardUncertainty": 0.05 } } ]
              },
              "view": { "kind": "cone", "spotRadiusMillimetre": 10, "distanceMillimetre": 700 },
              "surroundings": { "offsetKelvin": { "value": 0.5, "standardUncertainty": 1 } },
              "wellToWallDrop": { "partOfDifference": { "value": 0, "standardUncertainty": 2e-4 } },
              "baselines": [ { "band": "lw", "setPointCelsius": 50, "effectiveEmissivity": 0.9993, "standardUncertainty": 0.0004, "from": "commissioning", "at": "2026-01-15T00:00:00Z" } ],
              "channels": [
                { "id": "well-1", "name": "Bottom well", "quantity": "well-thermometer", "unit": "Ohm", "intervalSeconds": 1, "axialPositionMillimetre": 290, "reference": true },
                { "id": "set-point", "name": "Set point", "quantity": "set-point", "unit": "Cel", "intervalSeconds": 10 },
                { "id": "case", "name": "Outer case", "quantity": "outer-surface", "unit": "Cel", "intervalSeconds": 1, "contact": { "material": "coated-metal", "contactSeconds": 10 } },
                { "id": "lip", "name": "Lip indicator", "quantity": "aperture-lip", "unit": "Cel", "intervalSeconds": 1 },
              ]
            }
          ],
          "instruments": [
            {
              "id": "prt-1", "serialNumber": "S-1", "description": "Platinum resistance thermometer",
              "installations": [ { "source": "fir", "channel": "well-1", "from": "2026-01-01T00:00:00Z" } ],
              "certificates": [
                {
                  "id": "c-1", "revision": 1, "number": "N-1", "issuer": "Invented laboratory", "validFrom": "2026-01-01T00:00:00Z", "dueAt": "2027-01-01T00:00:00Z",
                  "range": { "minimumCelsius": -40, "maximumCelsius": 250 },
                  "characteristic": { "kind": "callendar-van-dusen", "expandedUncertaintyKelvin": 0.02, "coverageFactor": 2, "r0Ohm": 100.01, "a": 3.9083e-3, "b": -5.775e-7, "c": -4.183e-12 }
                }
              ]
            },
            {
              "id": "ind-1", "serialNumber": "S-2", "description": "Indicating thermometer",
              "installations": [
                { "source": "fir", "channel": "lip", "from": "2026-02-01T00:00:00Z" }
              ],
              "certificates": [
                {
                  "id": "c-2", "revision": 1, "number": "N-2", "issuer": "Invented laboratory", "validFrom": "2026-01-01T00:00:00Z", "calibratedAgainst": "fir",
                  "range": { "minimumCelsius": -20, "maximumCelsius": 90 },
                  "characteristic": { "kind": "correction-table", "expandedUncertaintyKelvin": 0.1, "coverageFactor": 2, "points": [ { "indicatedCelsius": -20, "correctionKelvin": 0.03 }, { "indicatedCelsius": 90, "correctionKelvin": -0.05 } ] }
                }
              ]
            },
            {
              "id": "ind-0", "serialNumber": "S-0", "description": "Its predecessor",
              "installations": [ { "source": "fir", "channel": "lip", "from": "2026-01-01T00:00:00Z", "until": "2026-02-01T00:00:00Z" } ]
            }
          ],
          "limits": [
            { "id": "fir-stability", "revision": 1, "source": "fir", "criterion": "stability", "maximum": 20, "unit": "mK", "rule": "guard-band", "effectiveFrom": "2026-01-01T00:00:00Z" }
          ],
          "notifiers": [ { "id": "gateway", "kind": "webhook", "address": "https://messages.example/labwatch", "secretName": "gateway-key" } ]
        }
        """;
}
