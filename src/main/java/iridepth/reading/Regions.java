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
    /** Pixels with one candidate only that settle a region's order, and their least share of its pixels. */
    private static final int SETTLING = 20;
    private static final double SETTLING_SHARE = 1e-3;
    /** Pixels of a border that must agree on another order. */
    private static final int AGREEING = 3;

    private final CurveIndex index;
    private final JumpPenalty penalty;
    private final int width;
    private final FilmRegion[] below;
    private final float[] belowThickness;
    private final byte[] belowGap;
    private final FilmRegion[] here;
    private final RegionRuns runs;
    private final RegionWitnesses witnesses;
    private final List<FilmRegion> all = new ArrayList<>();
    private final boolean specks;

    /** @param specks whether the readings of regions that are too small to have an order of their own are taken out */
    Regions(CurveIndex index, JumpPenalty penalty, int width, int height, boolean specks) {
        this.specks = specks;
        this.index = index;
        this.penalty = penalty;
        this.width = width;
        this.below = new FilmRegion[width];
        this.belowThickness = new float[width];
        this.belowGap = new byte[width];
        this.here = new FilmRegion[width];
        this.runs = new RegionRuns(width, height);
        this.witnesses = new RegionWitnesses(index, penalty, width);
    }

    /** Takes the next row upwards. */
    void add(int y, PixelRow pixels, ReadRow row) {
        link(row);
        for (int x : pixels.pinned()) {
            if (here[x] != null) {
                here[x].root().pin();
            }
        }
        runs.add(y, here, row);
        witnesses.add(y, pixels, row, here);
    }

    /** Finds the region of each pixel and leaves it in {@link #here}. */
    private void link(ReadRow row) {
        float[] thickness = row.thickness();
        FilmRegion beside = null;
        float besideThickness = 0;
        int besideAt = -1;
        for (int x = 0; x < width; x++) {
            float d = thickness[x];
            if (d != d) {
                here[x] = null;
                if (below[x] != null && ++belowGap[x] > Sweep.WIDEST_GAP) {
                    below[x] = null;
                }
                continue;
            }
            FilmRegion its = null;
            if (beside != null && x - besideAt <= Sweep.WIDEST_GAP + 1 && penalty.links(besideThickness, d, x - besideAt)) {
                its = beside;
            }
            FilmRegion lower = below[x];
            if (lower != null && its != lower && penalty.links(belowThickness[x], d, belowGap[x] + 1)) {
                its = its == null ? lower.root() : its.join(lower);
            }
            if (its == null) {
                its = new FilmRegion();
                all.add(its);
            }
            here[x] = its;
            below[x] = its;
            belowThickness[x] = d;
            belowGap[x] = 0;
            beside = its;
            besideThickness = d;
            besideAt = x;
        }
    }

    /** Whether a region's order is beyond doubt: it is known, or enough of its pixels leave no choice. */
    static boolean isSettled(FilmRegion region) {
        return region.pinned() || region.settled() >= SETTLING && region.settled() >= SETTLING_SHARE * region.pixels();
    }

    private boolean isSpeck(FilmRegion region) {
        return specks && region.pixels() < SPECK && region.contacts() > 0;
    }

    /** Takes the readings of specks out of a row that lies {@link #SPECK_ROWS} below the last one added, or of any at the end. */
    ReadRow clean(int y, ReadRow row) {
        ReadRow result = row;
        int from = 0;
        for (int i = 0; i < runs.count(y); i++) {
            FilmRegion its = runs.region(y, i);
            if (its != null && isSpeck(its)) {
                if (result == row) {
                    result = row.copy();
                }
                for (int x = from; x < runs.end(y, i); x++) {
                    result.leave(x, State.OFF_CURVE);
                }
            }
            from = runs.end(y, i);
        }
        return result;
    }

    /** The region of each pixel of a row, null where there is none. */
    FilmRegion[] of(int y) {
        FilmRegion[] of = new FilmRegion[width];
        int from = 0;
        for (int i = 0; i < runs.count(y); i++) {
            Arrays.fill(of, from, runs.end(y, i), runs.region(y, i));
            from = runs.end(y, i);
        }
        return of;
    }

    /** The regions whose order is open, with the other orders that are not refuted, the likeliest first. */
    private Map<FilmRegion, List<OrderChain>> open() {
        Map<FilmRegion, List<OrderChain>> open = new LinkedHashMap<>();
        for (FilmRegion its : all) {
            if (its.root() == its && !isSpeck(its) && !isSettled(its) && its.hasEvidence()) {
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
                    boolean firm = isSettled(other) || other.pixels() > region.pixels();
                    if (other != region && firm && count >= AGREEING) {
                        moves.add(new Move(region, chain, other, count));
                    }
                })));
        moves.sort(Comparator.comparing((Move move) -> isSettled(move.to())).thenComparingInt(Move::joined).reversed());
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
        int from = 0;
        for (int i = 0; i < runs.count(y); i++) {
            FilmRegion its = runs.region(y, i);
            State code = its == null ? runs.state(y, i) : isSpeck(its) ? State.OFF_CURVE
                    : its.doubtful() ? State.ORDER_DOUBTFUL : State.READ;
            Arrays.fill(into, at + from, at + runs.end(y, i), code.code());
            from = runs.end(y, i);
        }
    }
}
