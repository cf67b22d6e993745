import cmath
import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.runout import (
    change_at_stations,
    change_bounds,
    datum_uncertainty,
    drift,
    fit_harmonics,
    fit_survey,
    journal_datum,
    largest_sampling_loss,
    line_through_journals,
    vector_change,
)
from tests.published.printed import printed
from tests.published.runout import CHANGES, DATUM, LOSSES, TURNS, at
from tests.second_paths.turning_circle import dial_readings, discrete_spectrum

MICRON = 1e-6
NANOMETRE = 1e-9


def evenly(count):
    return np.arange(count) * 2.0 * math.pi / count


def degrees(vector):
    return math.degrees(cmath.phase(vector)) % 360.0


@pytest.mark.parametrize("turn", TURNS, ids=lambda turn: turn.case)
def test_one_turn_agrees_with_its_source(turn):
    fit = fit_harmonics(
        angles=evenly(len(turn.readings)), readings=np.array(turn.readings) * MICRON
    )
    assert abs(fit.eccentricity) == printed(turn.offset, MICRON), turn.source
    assert degrees(fit.eccentricity) == printed(turn.offset_degrees), turn.source
    assert fit.sampled_tir == printed(turn.total, MICRON), turn.source
    if turn.second is not None:
        assert abs(fit.second) == printed(turn.second, MICRON), turn.source
    if turn.second_lobe_degrees is not None:
        assert degrees(fit.second) / 2 == printed(turn.second_lobe_degrees), turn.source
    if turn.out_of_roundness is not None:
        assert fit.out_of_roundness == printed(turn.out_of_roundness, MICRON), turn.source


@pytest.mark.parametrize("row", LOSSES, ids=lambda row: f"{row.count} marks")
def test_sampling_loss_agrees_with_its_source(row):
    assert 100 * largest_sampling_loss(count=row.count) == printed(row.percent), row.source


@pytest.mark.parametrize("count", [3, 4, 5, 6, 7, 8, 9, 12])
def test_no_high_spot_loses_more_than_the_sampling_loss(count):
    lost = []
    for high_spot in np.linspace(0.0, 2.0 * math.pi, 2001):
        seen = np.cos(evenly(count) - high_spot)
        lost.append(1.0 - (seen.max() - seen.min()) / 2.0)
    assert max(lost) == pytest.approx(largest_sampling_loss(count=count), rel=2e-3)


def test_an_offset_round_disc_turned_under_an_indicator_gives_its_offset_back():
    offset = at(20, 40) * MICRON
    marks = evenly(12)
    fit = fit_harmonics(
        angles=marks, readings=dial_readings(radius=0.1, offset=offset, marks=marks)
    )
    # The outline rises by e² / 2R beyond the cosine: 2 nm here.
    assert abs(fit.eccentricity - offset) < 3 * NANOMETRE


def test_lobes_turned_under_an_indicator_are_found_beside_the_offset():
    marks = evenly(12)
    readings = dial_readings(
        radius=0.1,
        offset=at(20, 40) * MICRON,
        marks=marks,
        lobes=[(2, 5 * MICRON, math.radians(10))],
    )
    fit = fit_harmonics(angles=marks, readings=readings)
    assert abs(fit.second - at(5, 20) * MICRON) < 5 * NANOMETRE


@pytest.mark.parametrize("count", [6, 8, 12, 16])
def test_evenly_spaced_readings_agree_with_a_fourier_transform(count):
    readings = np.random.default_rng(count).normal(size=count) * 10 * MICRON
    fit = fit_harmonics(angles=evenly(count), readings=readings)
    spectrum = discrete_spectrum(readings)
    assert abs(fit.eccentricity - spectrum[1]) < 1e-12
    assert abs(fit.second - spectrum[2]) < 1e-12
    assert fit.mean == pytest.approx(readings.mean(), abs=1e-12)


@pytest.mark.parametrize("count", [8, 12])
@pytest.mark.parametrize("step", [-1, 1])
def test_the_two_forms_named_as_unseen_do_read_as_an_offset(count, step):
    marks = evenly(count)
    lobes = count + step
    fit = fit_harmonics(angles=marks, readings=5 * MICRON * np.cos(lobes * marks))
    assert lobes in fit.aliased_harmonics
    assert abs(fit.eccentricity) == pytest.approx(5 * MICRON)


def test_marks_missing_from_a_regular_circle_leave_the_same_forms_unseen():
    readings = 5 * MICRON * np.cos(11 * evenly(12))
    readings[[1, 4, 5]] = np.nan
    fit = fit_harmonics(angles=evenly(12), readings=readings)
    assert fit.aliased_harmonics == (11, 13)
    assert abs(fit.eccentricity) == pytest.approx(5 * MICRON)


def test_marks_on_no_regular_circle_name_no_form_as_unseen():
    marks = np.array([0.0, 0.71, 1.93, 2.84, 4.05, 5.17])
    assert fit_harmonics(angles=marks, readings=np.cos(marks)).aliased_harmonics == ()


def test_missing_and_uneven_marks_still_give_the_offset():
    marks = np.radians([0, 25, 70, 110, 180, 200, 260, 300, 340])
    truth = at(20, 40) * MICRON
    readings = 3 * MICRON + (truth * np.exp(-1j * marks)).real + 4 * MICRON * np.cos(2 * marks)
    readings[[2, 5]] = np.nan
    fit = fit_harmonics(angles=marks, readings=readings)
    assert abs(fit.eccentricity - truth) < 1e-12
    assert fit.count == 7
    assert np.isnan(fit.residuals).tolist() == np.isnan(readings).tolist()


@pytest.mark.parametrize(
    ("count", "highest", "fitted"), [(3, 2, 1), (4, 2, 1), (5, 2, 1), (6, 2, 2), (12, 4, 4)]
)
def test_the_highest_harmonic_is_lowered_and_said_where_readings_are_few(count, highest, fitted):
    fit = fit_harmonics(angles=evenly(count), readings=np.cos(evenly(count)), highest=highest)
    assert fit.highest_fitted == fitted
    assert fit.degrees_of_freedom == count - 1 - 2 * fitted
    assert cmath.isnan(fit.second) == (fitted < 2)


def test_three_readings_without_an_instrument_do_not_know_their_uncertainty():
    fit = fit_harmonics(angles=evenly(3), readings=[1.0, 2.0, 3.0])
    assert math.isnan(fit.vector_uncertainty)


def test_three_readings_with_an_instrument_have_its_uncertainty():
    fit = fit_harmonics(angles=evenly(3), readings=[1.0, 2.0, 3.0], instrument_uncertainty=0.3)
    assert fit.vector_uncertainty == pytest.approx(0.3 * math.sqrt(2 / 3))


@pytest.mark.parametrize(
    "marks", [evenly(8), evenly(12), np.radians([0, 30, 60, 90, 150, 200, 300])]
)
def test_the_stated_uncertainty_is_the_scatter_of_repeated_surveys(marks):
    source = np.random.default_rng(1)
    truth = at(15, 70) * MICRON
    clean = (truth * np.exp(-1j * marks)).real
    fits = [
        fit_harmonics(angles=marks, readings=clean + source.normal(size=marks.size) * MICRON)
        for _ in range(4000)
    ]
    errors = np.array([fit.eccentricity - truth for fit in fits])
    components = np.cov(np.vstack([errors.real, errors.imag]))
    greatest = math.sqrt(np.linalg.eigvalsh(components)[-1])
    stated = math.sqrt(np.mean([fit.vector_uncertainty**2 for fit in fits]))
    assert stated == pytest.approx(greatest, rel=0.06)


def test_turned_marks_scatter_the_vector_sideways_by_the_stated_uncertainty():
    source = np.random.default_rng(2)
    marks = evenly(12)
    turn = math.radians(2.0)
    sideways = [
        fit_harmonics(
            angles=marks, readings=20 * MICRON * np.cos(marks + source.normal() * turn)
        ).eccentricity.imag
        for _ in range(4000)
    ]
    stated = fit_harmonics(
        angles=marks, readings=20 * MICRON * np.cos(marks), indexing_uncertainty=turn
    ).vector_uncertainty
    assert stated == pytest.approx(np.std(sideways), rel=0.05)


@given(constant=st.floats(-1e-3, 1e-3), seed=st.integers(0, 10_000))
def test_setting_the_dial_to_another_zero_changes_no_vector(constant, seed):
    readings = np.random.default_rng(seed).normal(size=9) * MICRON
    first = fit_harmonics(angles=evenly(9), readings=readings)
    second = fit_harmonics(angles=evenly(9), readings=readings + constant)
    assert abs(first.eccentricity - second.eccentricity) < 1e-15


@given(turn=st.floats(-math.pi, math.pi), seed=st.integers(0, 10_000))
def test_turning_the_reference_mark_turns_the_vector(turn, seed):
    readings = np.random.default_rng(seed).normal(size=8) * MICRON
    first = fit_harmonics(angles=evenly(8), readings=readings)
    second = fit_harmonics(angles=evenly(8) + turn, readings=readings)
    assert abs(first.eccentricity * cmath.exp(1j * turn) - second.eccentricity) < 1e-15


def test_fewer_than_three_angles_are_refused_by_name():
    with pytest.raises(OutOfRangeError, match="angles"):
        fit_harmonics(angles=[0.0, 1.0, 2.0 * math.pi], readings=[1.0, 2.0, 1.0])


def test_readings_that_are_not_as_many_as_the_angles_are_refused_by_name():
    with pytest.raises(OutOfRangeError, match="readings"):
        fit_harmonics(angles=[0.0, 1.0, 2.0], readings=[1.0, 2.0])


def test_a_reading_repeated_at_the_first_mark_counts_as_another_reading_of_it():
    marks = np.append(evenly(8), 2.0 * math.pi)
    fit = fit_harmonics(angles=marks, readings=np.cos(marks))
    assert fit.count == 9
    assert fit.highest_fitted == 2
    assert fit.eccentricity == pytest.approx(1.0)


def test_a_survey_gives_what_its_stations_give_one_by_one():
    source = np.random.default_rng(3)
    table = source.normal(size=(14, 12)) * 10 * MICRON
    table[2, 3] = table[5, 3] = table[5, 9] = np.nan
    table[7, 2:] = np.nan
    options = {"instrument_uncertainty": 8 * MICRON, "indexing_uncertainty": 0.02}
    survey = fit_survey(angles=evenly(12), readings=table, **options)
    for station in [0, 2, 5, 13]:
        one = fit_harmonics(angles=evenly(12), readings=table[station], **options)
        assert survey.eccentricities[station] == pytest.approx(one.eccentricity, abs=1e-15)
        assert survey.seconds[station] == pytest.approx(one.second, abs=1e-15)
        assert survey.means[station] == pytest.approx(one.mean, abs=1e-15)
        assert survey.out_of_roundness[station] == pytest.approx(one.out_of_roundness, abs=1e-15)
        assert survey.sampled_tir[station] == pytest.approx(one.sampled_tir, abs=1e-15)
        assert survey.vector_uncertainties[station] == pytest.approx(one.vector_uncertainty)
        assert survey.counts[station] == one.count
        assert survey.residuals[station] == pytest.approx(one.residuals, abs=1e-15, nan_ok=True)
    assert np.isnan(survey.eccentricities[7])
    assert np.isnan(survey.sampled_tir[7])


def test_the_scatter_pooled_over_a_survey_is_that_of_its_readings():
    table = np.random.default_rng(4).normal(size=(400, 8)) * MICRON
    scatter = fit_survey(angles=evenly(8), readings=table).pooled_scatter
    assert scatter == pytest.approx(MICRON, rel=0.06)


@pytest.mark.parametrize("row", DATUM, ids=lambda row: f"{row.position} m")
def test_offsets_from_the_journal_axis_agree_with_their_source(row):
    first, second = at(6, 30), at(4, 250)
    line = line_through_journals(
        first_position=0.0,
        first_vector=first,
        second_position=1.8,
        second_vector=second,
        positions=[row.position],
    )[0]
    corrected = journal_datum(
        positions=[0.0, row.position, 1.8],
        vectors=[first, row.measured, second],
        first_journal=0,
        second_journal=2,
    )[1]
    assert abs(line) == printed(row.line), row.source
    assert degrees(line) == printed(row.line_degrees), row.source
    assert abs(corrected) == printed(row.corrected), row.source
    assert degrees(corrected) == printed(row.corrected_degrees), row.source
    assert 2 * abs(row.measured) == printed(row.raw_total), row.source
    assert 2 * abs(corrected) == printed(row.corrected_total), row.source


@given(
    shift=st.complex_numbers(max_magnitude=1e-3),
    tilt=st.complex_numbers(max_magnitude=1e-3),
    seed=st.integers(0, 10_000),
)
def test_however_a_rotor_is_laid_its_own_axis_says_the_same(shift, tilt, seed):
    source = np.random.default_rng(seed)
    places = np.array([0.0, 0.2, 0.5, 0.9, 1.4, 1.7])
    vectors = (source.normal(size=6) + 1j * source.normal(size=6)) * MICRON
    journals = {"positions": places, "first_journal": 1, "second_journal": 4}
    once = journal_datum(vectors=vectors, **journals)
    again = journal_datum(vectors=vectors + shift + tilt * places, **journals)
    assert abs(once - again).max() < 1e-15


def test_the_uncertainty_of_corrected_offsets_is_their_scatter():
    source = np.random.default_rng(5)
    places = [0.0, 0.3, 1.0, 1.8, 2.2]
    spreads = np.array([1.0, 2.0, 0.5, 1.5, 1.0])
    noise = (source.normal(size=(20_000, 5)) + 1j * source.normal(size=(20_000, 5))) * spreads
    journals = {"positions": places, "first_journal": 0, "second_journal": 3}
    seen = np.std(np.array([journal_datum(vectors=row, **journals).real for row in noise]), axis=0)
    assert datum_uncertainty(uncertainties=spreads, **journals) == pytest.approx(seen, rel=0.03)


def test_journals_at_one_place_are_refused_by_name():
    with pytest.raises(OutOfRangeError, match="second_journal"):
        journal_datum(positions=[0.0, 0.0], vectors=[0, 0], first_journal=0, second_journal=1)
    with pytest.raises(OutOfRangeError, match="second_position"):
        line_through_journals(
            first_position=1.0,
            first_vector=0,
            second_position=1.0,
            second_vector=0,
            positions=[2.0],
        )


@pytest.mark.parametrize("journal", [-1, 2])
def test_a_journal_that_is_no_station_is_refused_by_name(journal):
    with pytest.raises(OutOfRangeError, match="first_journal"):
        datum_uncertainty(
            positions=[0.0, 1.0], uncertainties=[1, 1], first_journal=journal, second_journal=1
        )


def test_a_journal_that_was_not_read_leaves_nothing_known():
    corrected = journal_datum(
        positions=[0.0, 0.5, 1.0], vectors=[np.nan, 1.0, 0.0], first_journal=0, second_journal=2
    )
    assert np.isnan(corrected).all()


def change_of(before, after, spread=0.0):
    return change_at_stations(
        positions=[0.0, 0.5, 1.0],
        before_vectors=[0, before, 0],
        after_vectors=[0, after, 0],
        before_uncertainties=[spread] * 3,
        after_uncertainties=[spread] * 3,
        first_journal=0,
        second_journal=2,
    )


@pytest.mark.parametrize("row", CHANGES, ids=lambda row: row.case)
def test_change_of_a_mount_agrees_with_its_source(row):
    change = change_of(row.before, row.after)
    assert change.tir[1] == printed(row.vector), row.source
    assert change.plain_tir_changes[1] == printed(row.plain), row.source
    assert 2 * abs(vector_change(before=row.before, after=row.after)) == printed(row.vector)


vectors = st.complex_numbers(max_magnitude=1e3, allow_nan=False)


@given(before=vectors, after=vectors)
def test_the_change_lies_within_its_bounds_and_never_below_the_plain_one(before, after):
    tir = change_of(before, after).tir[1]
    bounds = change_bounds(tir_before=2 * abs(before), tir_after=2 * abs(after))
    assert bounds.least - 1e-9 <= tir <= bounds.greatest + 1e-9


@given(before=vectors, after=vectors)
def test_there_and_back_is_no_change(before, after):
    there, back = change_of(before, after), change_of(after, before)
    assert abs(there.changes + back.changes).max() < 1e-9


def test_the_uncertainty_of_a_change_is_its_scatter():
    source = np.random.default_rng(6)
    noise = (source.normal(size=(8000, 2, 3)) + 1j * source.normal(size=(8000, 2, 3))) * MICRON
    truth = np.array([0.0, 30e-6, 0.0])
    seen = []
    for before, after in noise:
        change = change_at_stations(
            positions=[0.0, 0.4, 1.0],
            before_vectors=before,
            after_vectors=truth + after,
            before_uncertainties=[MICRON] * 3,
            after_uncertainties=[MICRON] * 3,
            first_journal=0,
            second_journal=2,
        )
        seen.append(change.tir[1])
    assert change.tir_uncertainties[1] == pytest.approx(np.std(seen), rel=0.03)
    assert np.mean(seen) == pytest.approx(60e-6, rel=0.01)


def test_a_station_missing_from_one_survey_has_no_change_and_spoils_no_other():
    change = change_at_stations(
        positions=[0.0, 0.3, 0.6, 1.0],
        before_vectors=[0, np.nan, 1.0, 0],
        after_vectors=[0, 1.0, 1.5j, 0],
        before_uncertainties=[0, np.nan, 0.1, 0],
        after_uncertainties=[0, 0.1, 0.1, 0],
        first_journal=0,
        second_journal=3,
    )
    assert np.isnan(change.tir).tolist() == [False, True, False, False]
    assert np.isnan(change.tir_uncertainties).tolist() == [False, True, False, False]


def test_surveys_of_unequal_length_are_refused_by_name():
    with pytest.raises(OutOfRangeError, match="after_vectors"):
        change_at_stations(
            positions=[0.0, 1.0],
            before_vectors=[0, 0],
            after_vectors=[0, 0, 0],
            before_uncertainties=[0, 0],
            after_uncertainties=[0, 0],
            first_journal=0,
            second_journal=1,
        )


@pytest.mark.parametrize("name", ["tir_before", "tir_after"])
def test_a_negative_total_is_refused_by_name(name):
    totals = {"tir_before": 1.0, "tir_after": 1.0} | {name: -1.0}
    with pytest.raises(OutOfRangeError, match=name):
        change_bounds(**totals)


def test_small_changes_one_way_add_up_in_the_drift():
    steps = np.cumsum([at(4, 10), at(4, 20), at(4, 30)])
    moved = drift(
        positions=[0.0, 0.5, 1.0],
        surveys=[[0, 0, 0], *([0, step, 0] for step in steps)],
        uncertainties=[[0.1] * 3] * 4,
        first_journal=0,
        second_journal=2,
    )
    # By hand: three vectors of 4 at 10°, 20°, 30° make 4·(1 + 2·cos 10°) = 11.878.
    assert moved[-1].tir[1] / 2 == printed("11.878")
    assert moved[0].tir[1] / 2 == pytest.approx(4.0)


def test_a_drift_without_a_bare_shaft_is_refused_by_name():
    journals = {"positions": [0.0, 1.0], "first_journal": 0, "second_journal": 1}
    with pytest.raises(OutOfRangeError, match="surveys"):
        drift(surveys=[], uncertainties=[], **journals)
    with pytest.raises(OutOfRangeError, match="uncertainties"):
        drift(surveys=[[0, 0]], uncertainties=[], **journals)


@pytest.mark.parametrize("count", [0, 2])
def test_fewer_than_three_marks_have_no_sampling_loss(count):
    with pytest.raises(OutOfRangeError, match="count"):
        largest_sampling_loss(count=count)
