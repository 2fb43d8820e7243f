package iridepth.reading;

import iridepth.photo.Region;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;

/**
 * The regions of continuous thickness in a picture, gathered row by row from the bottom up: pixels are of one region where a
 * film may go from one to the other, across a gap of {@link Sweep#WIDEST_GAP} pixels at most.
 */
final class Regions {
    /** Pixels below which a region that meets other things is a speck. */
    private static final int SPECK = 5;
    /** Rows after which no pixel can join a speck any more. */
    static final int SPECK_ROWS = SPECK * (Sweep.WIDEST_GAP + 1);
    /** Pixels of a border that must agree on another order. */
    private static final int AGREEING = 3;

    private final CurveIndex index;
    private final JumpPenalty penalty;
    private final int width;
    private final RegionRow[] rows;
    private final RegionLinks links;
    private final RegionWitnesses witnesses;
    private final List<FilmRegion> all = new ArrayList<>();
    private final boolean specks;
    private ReadRow below;

    /** @param specks whether the readings of regions that are too small to have an order of their own are taken out */
    Regions(CurveIndex index, JumpPenalty penalty, int width, int height, boolean specks) {
        this.specks = specks;
        this.index = index;
        this.penalty = penalty;
        this.width = width;
        this.rows = new RegionRow[height];
        this.links = new RegionLinks(penalty, width);
        this.witnesses = new RegionWitnesses(index, penalty);
    }

    /** Takes the next row upwards. */
    void add(int y, ReadRow row) {
        RegionRow runs = RegionRow.of(row, penalty);
        RegionRow runsBelow = y + 1 < rows.length ? rows[y + 1] : null;
        rows[y] = runs;
        links.link(runs, row, runsBelow, below);
        for (int i = 0; i < runs.runs(); i++) {
            FilmRegion its = runs.root(i);
            if (its != null) {
                if (its.pixels() == 0) {
                    all.add(its);
                }
                count(y, its, row, runs.from(i), runs.end()[i]);
            }
        }
        for (int x : row.pixels().pinned()) {
            FilmRegion its = runs.root(runs.run(x));
            if (its != null) {
                its.pin();
            }
        }
        witnesses.add(y, runs, row, runsBelow, below);
        below = row;
    }

    private void count(int y, FilmRegion its, ReadRow row, int from, int to) {
        double sum = 0;
        for (int x = from; x < to; x++) {
            sum += row.thickness()[x];
        }
        its.add(y, from, to, sum);
        its.meet((from > 0 ? 1 : 0) + (to < width ? 1 : 0));
        if (!its.isSettled()) {
            PixelRow pixels = row.pixels();
            int settled = to - from;
            int noted = Arrays.binarySearch(pixels.column(), from);
            for (int i = noted < 0 ? -noted - 1 : noted; i < pixels.noted() && pixels.column()[i] < to; i++) {
                settled -= pixels.count(i) > 1 ? 1 : 0;
            }
            its.settle(settled);
        }
    }

    private boolean isSpeck(FilmRegion region) {
        return specks && region.pixels() < SPECK && region.contacts() > 0;
    }

    /** Takes the readings of specks out of a row that lies {@link #SPECK_ROWS} below the last one added, or of any at the end. */
    ReadRow clean(int y, ReadRow row) {
        ReadRow result = row;
        for (int i = 0; i < rows[y].runs(); i++) {
            FilmRegion its = rows[y].root(i);
            if (its != null && isSpeck(its)) {
                if (result == row) {
                    result = row.copy();
                }
                Arrays.fill(result.thickness(), rows[y].from(i), rows[y].end()[i], Float.NaN);
            }
        }
        return result;
    }

    /** The region of each pixel of a row, null where there is none. */
    FilmRegion[] of(int y) {
        FilmRegion[] of = new FilmRegion[width];
        for (int i = 0; i < rows[y].runs(); i++) {
            Arrays.fill(of, rows[y].from(i), rows[y].end()[i], rows[y].root(i));
        }
        return of;
    }

    /** The regions whose order is open, with the other orders that are not refuted, the likeliest first. */
    private Map<FilmRegion, List<OrderChain>> open() {
        Map<FilmRegion, List<OrderChain>> open = new LinkedHashMap<>();
        for (FilmRegion its : all) {
            if (its.root() == its && !isSpeck(its) && !its.isSettled() && its.hasEvidence()) {
                List<OrderChain> alternatives = its.evidence(index).alternatives(its.pixels());
                if (!alternatives.isEmpty()) {
                    open.put(its, alternatives);
                }
            }
        }
        return open;
    }

    /** That a region takes another order, by which so many pixels of its border join another region. */
    private record Move(FilmRegion region, OrderChain chain, FilmRegion to, int joined) {
    }

    /**
     * When all rows have been added, finds the regions of open order that would join a neighbour if they took another of their
     * orders: such a border is none of the film. The neighbour must be settled, or larger.
     */
    OrderCorrection correction() {
        List<Move> moves = new ArrayList<>();
        open().forEach((region, alternatives) -> alternatives.forEach(chain -> region.evidence(index).joined(chain)
                .forEach((other, count) -> {
                    boolean firm = other.isSettled() || other.pixels() > region.pixels();
                    if (other != region && firm && count >= AGREEING) {
                        moves.add(new Move(region, chain, other, count));
                    }
                })));
        moves.sort(Comparator.comparing((Move move) -> move.to().isSettled()).thenComparingInt(Move::joined).reversed());
        Map<FilmRegion, OrderChain> chains = new HashMap<>();
        Set<FilmRegion> stay = new HashSet<>();
        for (Move move : moves) {
            if (!chains.containsKey(move.region()) && !stay.contains(move.region()) && !chains.containsKey(move.to())) {
                chains.put(move.region(), move.chain());
                stay.add(move.to());
            }
        }
        return new OrderCorrection(this, chains);
    }

    /** Judges all regions when all rows have been added; those in doubt, largest first. */
    List<DoubtfulRegion> judge() {
        List<DoubtfulRegion> doubtful = new ArrayList<>();
        open().forEach((region, alternatives) -> {
            region.setDoubtful();
            int[] box = region.box();
            doubtful.add(new DoubtfulRegion(new Region(box[0], box[1], box[2], box[3]), region.pixels(), region.mean(),
                    alternatives.stream().map(c -> new DoubtfulRegion.Alternative(c.meanNm(), c.evidence())).toList()));
        });
        doubtful.sort(Comparator.comparingLong(DoubtfulRegion::pixels).reversed());
        return doubtful;
    }

    /** The states of a row, after {@link #judge}. */
    void states(int y, byte[] into, int at) {
        RegionRow runs = rows[y];
        for (int i = 0; i < runs.runs(); i++) {
            FilmRegion its = runs.root(i);
            byte code = its == null ? runs.state()[i] : isSpeck(its) ? State.OFF_CURVE.code()
                    : its.doubtful() ? State.ORDER_DOUBTFUL.code() : State.READ.code();
            Arrays.fill(into, at + runs.from(i), at + runs.end()[i], code);
        }
    }
}
