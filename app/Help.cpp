// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/Help.h"

namespace spanwright {

std::string_view helpText() {
    return R"(spanwright: a workbench for calibrating sensors

  spanwright [--stage job|bench|budget|certificate] [--scheme light|dark] [FILE…]
                                        the window; FILE is a session or a CSV
  spanwright figures FILE [options]     what follows from the readings of a CSV or a session
  spanwright certificate SESSION --to OUT.pdf [--xml OUT.xml [--country CC]] [--incomplete] [--replace]
                                        the certificate draft as PDF, and in the open schema for digital certificates
  spanwright convert CSV --with SESSION --to OUT.csv|- [--indication COL] [--repeats Q] [--phase P] [--replace]
                                        new readings to values, each with its expanded uncertainty
  spanwright coefficients SESSION [--form plain|c|csv] [--to FILE|-] [--phase P] [--replace]
                                        the function for a data logger, in as few digits as its uncertainty allows
  spanwright check SESSION              verifies the seal, recomputes, compares with the stored results
  spanwright self-test [--to OUT.pdf [--replace]]
                                        recomputes published cases
  spanwright --help, --version

  A result of the same command that nobody changed is written anew. --replace writes over any other file that holds something;
  what is read, and a session, is never written over. "-" is standard output, for a table and for coefficients only.

Options of convert and coefficients
  --indication COL                      column of the indications, by name or number from 1; otherwise the one named as in the
                                        calibration or "indication", or the only one that can be meant
  --repeats Q|inf                       each row is the mean of Q new readings: repeatability is divided by Q, the rest stays; inf: no repeatability
  --phase as-found|as-left              whose function
  --missing WORD, --decimal comma|point, --separator S, --encoding E
                                        as for figures

Options of figures
  --reference COL --indication COL      columns by name or number from 1; the first two columns of numbers otherwise
  --set-point COL --direction COL --run COL
                                        grouping columns; a direction is up, down, rising or falling
  --u-reference COL --u-indication COL  standard uncertainties
  --u-covariance COL                    covariance of the errors of reference and indication of each reading
  --uncertainty-matrix FILE             covariances between readings: as many rows and columns of numbers as there are readings
                                        (indications), or twice as many (all references, then all indications)
  --shared-error budget|fit             where the calibration error that all readings of a standard share is counted
  --time COL                            time of each reading
  --function NAME                       constant, line, proportional, polynomial:N, polynomial-no-constant:N, square-root,
                                        logarithmic, power, exponential-approach, callendar-van-dusen, thermistor-b,
                                        steinhart-hart:N, nernst, table; a constant needs no reference
  --fit indication|reference            the quantity that the function gives
  --method least-squares|both-uncertain|robust
  --weights equal|stated|replicates|proportional|variance-function
  --covariance residuals|stated         scaled by the residuals, or from the stated uncertainties as they are
  --robust huber|bisquare               which robust fit, for comparison
  --tolerance-share P                   share of all readings that the tolerance band holds, 0.95
  --coverage P                          probability of every interval, 0.95
  --phase as-found|as-left              of a session
  --at X[,X…]                           band and prediction at these reference values
  --read Y[,Y…] [--repeats Q|inf]       reference value from a mean of Q new readings; inf: an exact indication
  --outliers N --outlier-level P        most outliers tried; level of their tests, 0.05
  --positions D[,D…]                    how the item was turned in run 1, 2, …, degrees: adds the force figures
  --exclude ROW[,ROW…]                  data rows from 1
  --rows                                figures of every reading
  --json                                one JSON object instead of text
  --missing WORD                        a word that stands for no value; may be given several times
  --decimal comma|point --separator S --encoding E
                                        where the guess, which is printed, is wrong

Exit status: 0 done; 1 refused, with the reason; 2 wrong usage; 3 a certificate that is blocked, with each missing item.
)";
}

} // namespace spanwright
