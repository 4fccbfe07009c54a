// SPDX-License-Identifier: MIT
/// Everything of bismar::core, lowest floor first. Jobs in JSON (bismar/job/...), the evolutionary
/// engine (bismar/evolve/...) and the Eigen bridge (bismar/eigen/...) are libraries of their own
/// and are included by name.
#pragma once

#include <bismar/error.hpp>
#include <bismar/version.hpp>

#include <bismar/quantity/currency.hpp>
#include <bismar/quantity/format.hpp>
#include <bismar/quantity/parse.hpp>

#include <bismar/pareto/dominance.hpp>
#include <bismar/pareto/front.hpp>

#include <bismar/solver/box_problem.hpp>

#include <bismar/exchange/penalty.hpp>
#include <bismar/exchange/ruler.hpp>

#include <bismar/mechanics/column.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/load_effects.hpp>
#include <bismar/mechanics/member.hpp>
#include <bismar/mechanics/section.hpp>

#include <bismar/catalogue/catalogue.hpp>

#include <bismar/sizing/cost.hpp>
#include <bismar/sizing/existence.hpp>
#include <bismar/sizing/front.hpp>

#include <bismar/report/pictures.hpp>
#include <bismar/report/text_report.hpp>
