// SPDX-License-Identifier: GPL-3.0-or-later
// The least that a program with a chart can do: one window, one line, gone after its first paint.
#include <QApplication>
#include <QChart>
#include <QChartView>
#include <QLineSeries>
#include <QMainWindow>
#include <QTimer>

namespace {

class OnceChartView : public QChartView {
  public:
    using QChartView::QChartView;

  protected:
    void paintEvent(QPaintEvent* event) override {
        QChartView::paintEvent(event);
        QTimer::singleShot(0, qApp, &QCoreApplication::quit);
    }
};

} // namespace

int main(int argc, char** argv) {
    QApplication application(argc, argv);
    auto* line = new QLineSeries;
    for (int i = 0; i <= 10; ++i)
        line->append(i, 4.0 + 1.6 * i);
    auto* chart = new QChart;
    chart->addSeries(line);
    chart->createDefaultAxes();
    QMainWindow window;
    auto* view = new OnceChartView;
    view->setChart(chart);
    window.setCentralWidget(view);
    window.resize(1440, 900);
    window.show();
    return QApplication::exec();
}
