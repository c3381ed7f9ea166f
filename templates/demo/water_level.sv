// Water level of the tide gauge: corrected samples, a mean of the last four, and the extremes since the last survey.
module water_level #(
    parameter int W = 12
) (
    input  logic         clk,
    input  logic         rst_n,
    input  logic         adc_valid,
    input  logic [W-1:0] adc_data,
    input  logic [W-1:0] datum,        // subtracted from every sample
    input  logic         new_survey,   // forget the extremes
    output logic [W-1:0] level,
    output logic [W-1:0] mean,
    output logic [W-1:0] highest,
    output logic [W-1:0] lowest,
    output logic [15:0]  uptime        // clock cycles since reset, modulo 65536
);
    wire [W-1:0] corrected = adc_data < datum ? '0 : adc_data - datum;

    // One enable for everything that follows a sample.
    logic [W-1:0] tap0, tap1, tap2, tap3;
    always_ff @(posedge clk or negedge rst_n) begin
        if (!rst_n) begin
            tap0 <= '0;
            tap1 <= '0;
            tap2 <= '0;
            tap3 <= '0;
        end else if (adc_valid) begin
            tap0 <= corrected;
            tap1 <= tap0;
            tap2 <= tap1;
            tap3 <= tap2;
        end
    end

    wire [W+1:0] sum = {2'b0, tap0} + {2'b0, tap1} + {2'b0, tap2} + {2'b0, tap3};
    assign level = tap0;
    assign mean  = W'(sum >> 2);

    // The extremes move now and then: an enable inside the enable.
    always_ff @(posedge clk or negedge rst_n) begin
        if (!rst_n) begin
            highest <= '0;
            lowest  <= '1;
        end else if (new_survey) begin
            highest <= '0;
            lowest  <= '1;
        end else if (adc_valid) begin
            if (corrected > highest) highest <= corrected;
            if (corrected < lowest) lowest <= corrected;
        end
    end

    // Runs in every cycle: there is nothing to stop.
    always_ff @(posedge clk or negedge rst_n) begin
        if (!rst_n) uptime <= '0;
        else uptime <= uptime + 16'd1;
    end
endmodule
