// SPDX-License-Identifier: MIT
#include <bismar/job/job.hpp>

namespace bismar {

std::string starter_job() {
  return R"json({
  // A job for `bismar`. Every value with a dimension is a text with its unit: "300 mm", "655 N",
  // "8 mm..40 mm". Comments like this one are allowed. `bismar schema` prints all keys,
  // `bismar check JOB` finds what is wrong, `bismar front JOB` sizes the parts.
  "bismar": 1,
  "title": "A lever, to be changed into your own part",
  "currency": "EUR",

  "parts": [
    {
      "name": "lever",
      "quantity": 500,        // parts made over the life of the tooling
      // "batch": 100,        // parts made at a time; left out: all at once

      "member": {
        "length": "300 mm",

        // What to try. Shapes are made to size: their height (diameter, side) is free. A ratio is
        // fixed by a number (2), free inside a range ("0.5..2"), and free inside a usual range
        // where it is left out: then the front proves its answer within settings.epsilon.
        "shapes": [
          { "round": { "diameter": "8 mm..60 mm" } },
          // height is along z (up), width along y; "sizes" may be "continuous", "R20",
          // { "step": "0.5 mm" } or a list such as ["20 mm", "25 mm"]: each free dimension of the
          // shape, not only its height, is taken from them
          { "rectangle": { "height_to_width": 2, "height": "8 mm..80 mm", "sizes": { "step": "1 mm" } } }
        ],
        // Stock sizes as they are bought: lists by id, or "all".
        "stock": ["round-bar", "flat-bar"],

        "load_cases": [
          {
            "name": "service",
            "support": "cantilever",  // fixed at x = 0; or "pinned" at both ends
            // Loads are service values: factors are kept apart from them.
            "loads": [{ "force": "500 N", "at": "end", "along": "z" }],
            "factors": { "yield": 1.5 },
            "hand_loaded": true
          }
        ]
      },

      "limits": {
        "deflection": "5 mm",
        "mass": "3 kg",
        "cost": "60 EUR"
        // "routes": ["hot-forging"], "classes": ["steel"], "medium": "fresh water", ...
      },

      "finishes": ["none"]
    }
  ],

  // How the tables are read and what is kept; left out, each has its default.
  "settings": {
    "near": "5 %",          // designs within this of the front are kept
    "explain": "front"      // "full": also what cannot come near the front is examined
    // For shapes with several free sizes: no design that holds every limit by the margin "delta"
    // is better than the front by more than "epsilon".
    // "epsilon": "0.1 %", "delta": 1e-6
  },

  // Between which worths of a saved kilogram the choice is of interest.
  "exchange": { "mass": "0.5 EUR/kg..500 EUR/kg" }
}
)json";
}

}  // namespace bismar
